import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { newFormulaSchema } from '$lib/schemas/formula';
import { requireAct } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, orError } from '$lib/server/http/answering';
import { createFormula } from '$lib/server/services/formulas';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	await orError(async () => requireAct(signedIn(locals), 'editFormula'));
	return { form: await superValidate(zod4(newFormulaSchema)) };
};

export const actions = {
	default: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(newFormulaSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () => createFormula(signedIn(locals), form.data));
		if ('result' in answer) redirect(303, `/formulas/${answer.result}/1`);
		return answer;
	}
} satisfies Actions;
