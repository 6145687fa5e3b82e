import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { changePasswordSchema } from '$lib/schemas/person';
import { homeOf } from '$lib/server/access/home';
import { signedIn } from '$lib/server/access/signed-in';
import { blankCookie } from '$lib/server/auth/sessions';
import { answering } from '$lib/server/http/answering';
import { changePassword, readSessions, signOutEverywhere } from '$lib/server/auth/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	if (!locals.actor) redirect(303, '/sign-in?next=/account');
	const actor = signedIn(locals);
	return {
		name: actor.name,
		email: actor.email,
		home: homeOf(actor),
		sessions: await readSessions(actor, locals.sessionId),
		form: await superValidate(zod4(changePasswordSchema))
	};
};

export const actions = {
	change: async ({ request, locals, cookies }) => {
		if (!locals.actor) redirect(303, '/sign-in?next=/account');
		const form = await superValidate(request, zod4(changePasswordSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () =>
			changePassword(signedIn(locals), form.data.present, form.data.next, new Date())
		);
		if (!('result' in answer)) return answer;
		cookies.set(answer.result.name, answer.result.value, answer.result.attributes);
		return { form, changed: true };
	},
	everywhere: async ({ locals, cookies }) => {
		if (!locals.actor) redirect(303, '/sign-in?next=/account');
		await signOutEverywhere(signedIn(locals));
		const blank = blankCookie();
		cookies.set(blank.name, blank.value, blank.attributes);
		redirect(303, '/sign-in');
	}
} satisfies Actions;
