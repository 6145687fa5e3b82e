import { systemActor } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { handle } from '../db/pool';
import { withActor } from '../db/with-actor';
import { Refused } from '../refused';
import { countAttempt, forgiveAttempts, SIGN_IN_PER_ADDRESS, SIGN_IN_PER_PERSON } from './attempts';
import { verifyPassword } from './passwords';
import { openSession, type SessionCookie } from './sessions';

export interface Credentials {
	readonly email: string;
	readonly password: string;
}

/**
 * Checks e-mail and password, limited per person and per address.
 * @throws Refused 'wrong-credentials' or 'too-many-attempts'; neither tells whether the e-mail is known.
 */
export async function checkCredentials(credentials: Credentials, address: string, now: Date): Promise<string> {
	const email = credentials.email.trim().toLowerCase();
	await countAttempt(SIGN_IN_PER_ADDRESS, address, now);
	await countAttempt(SIGN_IN_PER_PERSON, email, now);
	const person = await handle()
		.selectFrom('person')
		.select(['id', 'password_hash'])
		.where('email', '=', email)
		.where('disabled_at', 'is', null)
		.executeTakeFirst();
	if (!(await verifyPassword(person?.password_hash ?? null, credentials.password)) || !person) {
		throw new Refused('wrong-credentials');
	}
	await forgiveAttempts(SIGN_IN_PER_PERSON, email);
	return person.id;
}

export async function signIn(credentials: Credentials, address: string, now: Date): Promise<SessionCookie> {
	const personId = await checkCredentials(credentials, address, now);
	await recordAtTheDoor(personId, 'signed-in');
	return openSession(personId);
}

export function recordAtTheDoor(
	personId: string,
	action: 'signed-in' | 'signed-out' | 'token-issued'
): Promise<unknown> {
	const actor = systemActor(personId);
	return withActor(actor, (trx) =>
		audit(trx, actor, { stream: { kind: 'workspace', id: WORKSPACE_SUBJECT }, action, subject: `person/${personId}` })
	);
}
