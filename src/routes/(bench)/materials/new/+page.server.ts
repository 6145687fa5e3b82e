import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { newMaterialSchema } from '$lib/schemas/material';
import { requireAct } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, orError } from '$lib/server/http/answering';
import { createMaterial } from '$lib/server/services/materials';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	await orError(async () => requireAct(signedIn(locals), 'editMaterial'));
	return { form: await superValidate(zod4(newMaterialSchema)) };
};

export const actions = {
	default: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(newMaterialSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () => createMaterial(signedIn(locals), form.data));
		if ('result' in answer) redirect(303, `/materials/${answer.result}/1`);
		return answer;
	}
} satisfies Actions;
