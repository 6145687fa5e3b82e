import { afterAll } from 'vitest';
import { createDatabase } from './support/database';

// Runs before the test file is imported, so that the application's configuration, read at first use, finds this database.
const database = await createDatabase();
process.env.DATABASE_URL = database.url('application');
process.env.DATABASE_OWNER_URL = database.url('owner');

// Hooks run last registered first: a file's own clean-up is over by the time its database goes.
afterAll(async () => {
	const { closePool } = await import('$lib/server/db/pool');
	const { stopQueue } = await import('$lib/server/jobs/queue');
	await stopQueue();
	await closePool();
	await database.drop();
});
