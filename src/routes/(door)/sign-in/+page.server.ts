import { redirect } from '@sveltejs/kit';
import { message, superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { signInSchema } from '$lib/schemas/sign-in';
import { homeOf } from '$lib/server/access/home';
import { loadActor } from '$lib/server/auth/load-actor';
import { signIn } from '$lib/server/auth/sign-in';
import { validateSession } from '$lib/server/auth/sessions';
import { config } from '$lib/server/config';
import { statusOf } from '$lib/server/http/answering';
import { Refused } from '$lib/server/refused';
import type { Actions, PageServerLoad } from './$types';

/** Only an address of this application may be the next one. */
const safeNext = (next: string | null) => (next?.startsWith('/') && !next.startsWith('//') ? next : null);

export const load: PageServerLoad = async ({ locals, url }) => {
	if (locals.actor) redirect(303, safeNext(url.searchParams.get('next')) ?? homeOf(locals.actor));
	return { form: await superValidate(zod4(signInSchema)), workspace: config().workspaceName };
};

export const actions = {
	signIn: async ({ request, cookies, url, getClientAddress }) => {
		const form = await superValidate(request, zod4(signInSchema));
		if (!form.valid) return message(form, { kind: 'refused', code: 'invalid', data: {} }, { status: 400 });
		let cookie;
		try {
			cookie = await signIn(form.data, getClientAddress(), new Date());
		} catch (thrown) {
			if (!(thrown instanceof Refused)) throw thrown;
			form.data.password = '';
			return message(
				form,
				{ kind: 'refused', code: thrown.code, data: thrown.data },
				{ status: statusOf(thrown.code) }
			);
		}
		cookies.set(cookie.name, cookie.value, cookie.attributes);
		const session = await validateSession(cookie.value);
		const actor = session && (await loadActor(session.personId));
		redirect(303, safeNext(url.searchParams.get('next')) ?? (actor ? homeOf(actor) : '/'));
	}
} satisfies Actions;
