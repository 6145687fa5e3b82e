import { actorOfToken } from '../auth/tokens';
import type { Actor } from '../access/actor';
import { problem } from './answering';

/** The actor behind "Authorization: Bearer …", or the answer that there is none. */
export async function bearerActor(request: Request, now: Date): Promise<Actor | Response> {
	const secret = /^Bearer ([\w-]{20,200})$/.exec(request.headers.get('authorization') ?? '')?.[1];
	const actor = secret === undefined ? null : await actorOfToken(secret, now);
	if (actor) return actor;
	return problem(401, 'unauthorised', 'A valid token is needed.', [], { 'www-authenticate': 'Bearer' });
}
