import { readdirSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import pg from 'pg';
import { NEWEST_MIGRATION, requireMigrated } from '$lib/server/db/migrated';
import { QUEUES, startQueue } from '$lib/server/jobs/queue';

let application: pg.Client;
let owner: pg.Client;

beforeAll(async () => {
	application = new pg.Client({ connectionString: process.env.DATABASE_URL });
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await Promise.all([application.connect(), owner.connect()]);
});
afterAll(() => Promise.all([application.end(), owner.end()]));

test('every migration of the folder is applied, and the build knows the newest', async () => {
	const folder = path.resolve(import.meta.dirname, '../../migrations');
	const files = readdirSync(folder).map((file) => file.replace(/\.ts$/, ''));
	const { rows } = await owner.query<{ name: string }>('select name from kysely_migration order by name');
	expect(rows.map(({ name }) => name)).toEqual(files.sort());
	expect(NEWEST_MIGRATION).toBe(files.at(-1));
	await expect(requireMigrated()).resolves.toBeUndefined();
});

describe('the application role', () => {
	test('neither bypasses row-level security nor owns a table', async () => {
		const { rows } = await application.query(
			`select rolsuper or rolbypassrls or rolcreaterole or rolcreatedb as privileged,
				exists (select 1 from pg_class where relowner = pg_roles.oid) as owns
			from pg_roles where rolname = current_user`
		);
		expect(rows).toEqual([{ privileged: false, owns: false }]);
	});

	test.each(['create table intruder ()', 'create table jobs.intruder ()', 'create schema intruder'])(
		'may not say: %s',
		async (statement) => {
			await expect(application.query(statement)).rejects.toThrow(/permission denied/);
		}
	);

	test('finds every queue made for it and can send to each', async () => {
		const boss = await startQueue({ supervises: true });
		const names = (await boss.getQueues()).map(({ name }) => name);
		expect(names).toEqual(expect.arrayContaining([...QUEUES]));
		for (const queue of QUEUES) {
			await boss.createQueue(queue);
			const id = await boss.send(queue, {});
			expect((await boss.fetch(queue))?.[0]?.id).toBe(id);
		}
		await boss.maintain();
	});
});
