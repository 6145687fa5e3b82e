import { handle } from './pool';
import { sql } from 'kysely';

/** The newest migration this build knows; a test compares it with the folder. */
export const NEWEST_MIGRATION = '0015_answers_and_limits';

/** @throws when the database is behind this build: migrating is a command, never part of a request. */
export async function requireMigrated(): Promise<void> {
	const { rows } = await sql<{ known: boolean }>`
		select exists (select 1 from kysely_migration where name = ${NEWEST_MIGRATION}) as known`.execute(handle());
	if (!rows[0]?.known) {
		throw new Error(`The database lacks the migration ${NEWEST_MIGRATION}. Run: npm run migrate`);
	}
}

/** Returns when the database answers; throws when it does not. */
export async function answers(): Promise<void> {
	await sql`select 1`.execute(handle());
}
