import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { newPasswordSchema } from '$lib/schemas/person';
import { setPassword } from '../auth/account';
import { readLink, type LinkPurpose } from '../auth/links';
import { answering } from './answering';

/** Whom a one-time link is for, and the form for the new password; `link` is null when the link is over. */
export async function readLinkPage(purpose: LinkPurpose, secret: string) {
	const link = await readLink(secret, purpose, new Date());
	return {
		link: link && { name: link.name, email: link.email },
		form: await superValidate(zod4(newPasswordSchema))
	};
}

/** Sets the password behind the link and lets its person in. */
export async function useLinkPage(purpose: LinkPurpose, secret: string, { request, cookies }: RequestEvent) {
	const form = await superValidate(request, zod4(newPasswordSchema));
	if (!form.valid) return fail(400, { form });
	const answer = await answering(form, () => setPassword(purpose, secret, form.data.password, new Date()));
	if (!('result' in answer)) return answer;
	cookies.set(answer.result.name, answer.result.value, answer.result.attributes);
	redirect(303, '/');
}
