import { fail } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resetSchema } from '$lib/schemas/person';
import { answering } from '$lib/server/http/answering';
import { requestReset } from '$lib/server/auth/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async () => ({ form: await superValidate(zod4(resetSchema)) });

export const actions = {
	default: async ({ request, getClientAddress }) => {
		const form = await superValidate(request, zod4(resetSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () => requestReset(form.data.email, getClientAddress(), new Date()));
		return 'result' in answer ? { form, asked: true } : answer;
	}
} satisfies Actions;
