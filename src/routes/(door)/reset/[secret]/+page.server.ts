import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { newPasswordSchema } from '$lib/schemas/person';
import { readLink } from '$lib/server/auth/links';
import { answering } from '$lib/server/http/answering';
import { setPassword } from '$lib/server/auth/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params }) => {
	const link = await readLink(params.secret, 'reset', new Date());
	return {
		link: link && { name: link.name, email: link.email },
		form: await superValidate(zod4(newPasswordSchema))
	};
};

export const actions = {
	default: async ({ request, params, cookies }) => {
		const form = await superValidate(request, zod4(newPasswordSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () => setPassword('reset', params.secret, form.data.password, new Date()));
		if (!('result' in answer)) return answer;
		cookies.set(answer.result.name, answer.result.value, answer.result.attributes);
		redirect(303, '/');
	}
} satisfies Actions;
