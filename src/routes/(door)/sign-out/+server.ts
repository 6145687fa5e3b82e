import { redirect } from '@sveltejs/kit';
import { recordAtTheDoor } from '$lib/server/auth/sign-in';
import { closeSession } from '$lib/server/auth/sessions';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async ({ locals, cookies }) => {
	if (locals.sessionId) {
		const cookie = await closeSession(locals.sessionId);
		cookies.set(cookie.name, cookie.value, cookie.attributes);
	}
	if (locals.actor) await recordAtTheDoor(locals.actor.personId, 'signed-out');
	redirect(303, '/sign-in');
};
