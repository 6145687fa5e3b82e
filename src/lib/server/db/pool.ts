import { Kysely, PostgresDialect } from 'kysely';
import pg from 'pg';
import { config } from '../config';
import type { Database } from './schema';

const { types } = pg;
// Calendar days and counts leave the driver as text; numeric already does. Nothing is turned into a float or a clock time.
types.setTypeParser(types.builtins.DATE, (text) => text);
types.setTypeParser(types.builtins.INT8, (text) => text);

let kysely: Kysely<Database> | undefined;

/** The one handle. Only server/db and server/auth may ask for it; everything else works inside withActor. */
export function handle(): Kysely<Database> {
	kysely ??= new Kysely<Database>({
		dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: config().databaseUrl, max: 10 }) })
	});
	return kysely;
}

export async function closePool(): Promise<void> {
	await kysely?.destroy();
	kysely = undefined;
}
