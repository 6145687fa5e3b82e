import { Lucia, TimeSpan } from 'lucia';
import { config } from '../config';
import { KyselySessionAdapter } from './session-adapter';

let lucia: Lucia | undefined;

function sessions(): Lucia {
	const { secureCookies } = config();
	lucia ??= new Lucia(new KyselySessionAdapter(), {
		sessionExpiresIn: new TimeSpan(2, 'w'),
		sessionCookie: {
			// The prefix binds the cookie to this host; browsers accept it only over https.
			name: secureCookies ? '__Host-costmary' : 'costmary',
			attributes: { secure: secureCookies, sameSite: 'lax', path: '/' }
		}
	});
	return lucia;
}

export interface SessionCookie {
	readonly name: string;
	readonly value: string;
	readonly attributes: Record<string, unknown> & { path: string };
}

const withPath = (cookie: { name: string; value: string; attributes: object }): SessionCookie => ({
	name: cookie.name,
	value: cookie.value,
	attributes: { path: '/', ...cookie.attributes }
});

export const sessionCookieName = () => sessions().sessionCookieName;

export async function openSession(personId: string): Promise<SessionCookie> {
	const session = await sessions().createSession(personId, {});
	return withPath(sessions().createSessionCookie(session.id));
}

export async function validateSession(id: string): Promise<{ personId: string; renewed: SessionCookie | null } | null> {
	const { session, user } = await sessions().validateSession(id);
	if (!session || !user) return null;
	return { personId: user.id, renewed: session.fresh ? withPath(sessions().createSessionCookie(id)) : null };
}

export async function closeSession(id: string): Promise<SessionCookie> {
	await sessions().invalidateSession(id);
	return blankCookie();
}

export const blankCookie = () => withPath(sessions().createBlankSessionCookie());

export const closeAllSessions = (personId: string) => sessions().invalidateUserSessions(personId);

export const sweepSessions = () => sessions().deleteExpiredSessions();
