import { sql } from 'kysely';
import { handle } from '../db/pool';
import { Refused } from '../refused';

/** Limits live in PostgreSQL, so that they hold across processes. */
export interface AttemptLimit {
	readonly name: string;
	readonly most: number;
	readonly seconds: number;
}

export const SIGN_IN_PER_PERSON: AttemptLimit = { name: 'sign-in:person', most: 8, seconds: 900 };
export const SIGN_IN_PER_ADDRESS: AttemptLimit = { name: 'sign-in:address', most: 300, seconds: 900 };
export const TOKENS_PER_PERSON: AttemptLimit = { name: 'token:person', most: 10, seconds: 60 };
export const CALLS_PER_TOKEN: AttemptLimit = { name: 'call:token', most: 600, seconds: 60 };

/** An open sign-in must not serve to guess the password behind it. */
export const PASSWORD_CHANGES: AttemptLimit = { name: 'password:person', most: 8, seconds: 900 };
/** An hour of asking for a new password. */
export const RESETS_PER_PERSON: AttemptLimit = { name: 'reset:person', most: 3, seconds: 3600 };
export const RESETS_PER_ADDRESS: AttemptLimit = { name: 'reset:address', most: 30, seconds: 3600 };

const windowStart = (limit: AttemptLimit, now: Date) =>
	new Date(Math.floor(now.getTime() / 1000 / limit.seconds) * limit.seconds * 1000);

/** Counts one attempt. @throws Refused 'too-many-attempts' with the seconds to wait. */
export async function countAttempt(limit: AttemptLimit, who: string, now: Date): Promise<void> {
	const start = windowStart(limit, now);
	const row = await handle()
		.insertInto('attempt')
		.values({ key: `${limit.name}:${who}`.slice(0, 200), window_start: start, count: 1 })
		.onConflict((conflict) =>
			conflict.columns(['key', 'window_start']).doUpdateSet({ count: sql<number>`attempt.count + 1` })
		)
		.returning('count')
		.executeTakeFirstOrThrow();
	if (row.count > limit.most) {
		const retryAfter = Math.ceil((start.getTime() + limit.seconds * 1000 - now.getTime()) / 1000);
		throw new Refused('too-many-attempts', { retryAfter, limit: limit.most });
	}
}

/** A success forgives the failures before it. */
export async function forgiveAttempts(limit: AttemptLimit, who: string): Promise<void> {
	await handle().deleteFrom('attempt').where('key', '=', `${limit.name}:${who}`.slice(0, 200)).execute();
}

export async function sweepAttempts(before: Date): Promise<void> {
	await handle().deleteFrom('attempt').where('window_start', '<', before).execute();
}
