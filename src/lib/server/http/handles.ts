import { randomUUID } from 'node:crypto';
import { error, redirect, type Handle } from '@sveltejs/kit';
import { loadActor } from '../auth/load-actor';
import { sessionCookieName, validateSession } from '../auth/sessions';

export const requestId: Handle = async ({ event, resolve }) => {
	event.locals.requestId = randomUUID();
	const response = await resolve(event);
	response.headers.set('x-request-id', event.locals.requestId);
	return response;
};

export const session: Handle = async ({ event, resolve }) => {
	event.locals.actor = null;
	event.locals.sessionId = event.cookies.get(sessionCookieName()) ?? null;
	if (event.locals.sessionId) {
		const valid = await validateSession(event.locals.sessionId);
		if (valid) event.locals.actor = await loadActor(valid.personId);
		if (valid?.renewed) event.cookies.set(valid.renewed.name, valid.renewed.value, valid.renewed.attributes);
	}
	return resolve(event);
};

const THEMES = ['light', 'dark'] as const;

export const languageAndTheme: Handle = ({ event, resolve }) => {
	const cookie = event.cookies.get('theme');
	event.locals.theme = THEMES.find((theme) => theme === cookie) ?? 'system';
	event.locals.language = 'en';
	return resolve(event, {
		transformPageChunk: ({ html }) =>
			html.replace('%costmary.lang%', event.locals.language).replace('%costmary.theme%', event.locals.theme)
	});
};

/** Staff sit at the bench, clients come to the counter; a stranger is shown the door. */
const SIDES = { '/(bench)/': 'staff', '/(counter)/': 'client' } as const;

export const sideGate: Handle = ({ event, resolve }) => {
	const group = Object.keys(SIDES).find((prefix) => event.route.id?.startsWith(prefix)) as
		keyof typeof SIDES | undefined;
	if (!group) return resolve(event);
	const { actor } = event.locals;
	if (!actor) redirect(303, `/sign-in?next=${encodeURIComponent(event.url.pathname + event.url.search)}`);
	// Missing and forbidden look the same from outside.
	if (actor.side !== SIDES[group]) error(404, { message: 'not-found', code: 'not-found' });
	return resolve(event);
};

export const securityHeaders: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	response.headers.set('x-content-type-options', 'nosniff');
	response.headers.set('referrer-policy', 'same-origin');
	response.headers.set('cross-origin-opener-policy', 'same-origin');
	response.headers.set('permissions-policy', 'camera=(), microphone=(), geolocation=()');
	if (event.locals.actor)
		response.headers.set('cache-control', response.headers.get('cache-control') ?? 'private, no-store');
	return response;
};
