import { createHash, randomBytes } from 'node:crypto';
import type { Actor } from '../access/actor';
import { handle } from '../db/pool';
import { newId } from '../db/id';
import { CALLS_PER_TOKEN, countAttempt, TOKENS_PER_PERSON } from './attempts';
import { loadActor } from './load-actor';
import { checkCredentials, recordAtTheDoor, type Credentials } from './sign-in';

const TOKEN_LIFE_MS = 60 * 60 * 1000;
const hashSecret = (secret: string) => createHash('sha256').update(secret).digest('hex');

export interface IssuedToken {
	readonly token: string;
	readonly expiresAt: string;
}

/** A short-lived token for the compute endpoints. @throws Refused as checkCredentials, and when issued too often. */
export async function issueToken(credentials: Credentials, address: string, now: Date): Promise<IssuedToken> {
	const personId = await checkCredentials(credentials, address, now);
	await countAttempt(TOKENS_PER_PERSON, personId, now);
	const secret = randomBytes(32).toString('base64url');
	const expiresAt = new Date(now.getTime() + TOKEN_LIFE_MS);
	await handle()
		.insertInto('api_token')
		.values({
			id: newId(),
			secret_hash: hashSecret(secret),
			person_id: personId,
			scopes: ['compute'],
			expires_at: expiresAt
		})
		.execute();
	await recordAtTheDoor(personId, 'token-issued');
	return { token: secret, expiresAt: expiresAt.toISOString() };
}

/** The actor behind a bearer token, or null. @throws Refused 'too-many-attempts' beyond the calls a minute. */
export async function actorOfToken(secret: string, now: Date): Promise<Actor | null> {
	const row = await handle()
		.selectFrom('api_token')
		.select(['id', 'person_id'])
		.where('secret_hash', '=', hashSecret(secret))
		.where('expires_at', '>', now)
		.where('revoked_at', 'is', null)
		.executeTakeFirst();
	if (!row) return null;
	await countAttempt(CALLS_PER_TOKEN, row.id, now);
	return loadActor(row.person_id);
}
