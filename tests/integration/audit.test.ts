import pg from 'pg';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { systemActor } from '$lib/server/access/actor';
import { verifyAudit } from '$lib/server/audit/verify';
import { withActor } from '$lib/server/db/with-actor';
import { createMaterial } from '$lib/server/services/materials';
import { insertPerson } from './support/people';

let superuser: pg.Client;
let application: pg.Client;
let stream: string;
let number = 0;

const faults = async () =>
	(await withActor(systemActor('00000000-0000-7000-8000-000000000000'), verifyAudit)).map(({ seq, why }) => [seq, why]);
/** As somebody who has the whole database in hand, past every trigger. */
const tamper = async (statement: string) => {
	await superuser.query('begin');
	await superuser.query('set local session_replication_role = replica');
	await superuser.query(statement, [stream]);
	await superuser.query('commit');
};

beforeAll(async () => {
	const name = new URL(process.env.DATABASE_URL ?? '').pathname.slice(1);
	const url = new URL(process.env.COSTMARY_TEST_SUPERUSER_URL ?? '');
	url.pathname = `/${name}`;
	superuser = new pg.Client({ connectionString: url.href });
	application = new pg.Client({ connectionString: process.env.DATABASE_URL });
	await Promise.all([superuser.connect(), application.connect()]);
});
afterAll(() => Promise.all([superuser.end(), application.end()]));

beforeEach(async () => {
	await superuser.query('truncate audit_row, audit_stream, audit_checkpoint');
	number += 1;
	const formulator = await insertPerson(superuser, `formulator-${number}`, 'formulator');
	for (const each of ['A', 'B'])
		await createMaterial(formulator, { code: `${each}-${number}`, tradeName: 'Any', supplier: `Supplier ${number}` });
	const { rows } = await superuser.query('select stream_id from audit_row order by at limit 1');
	stream = rows[0].stream_id;
});

describe('the audit trail', () => {
	test('that nobody touched has no fault', async () => {
		expect(await faults()).toEqual([]);
	});

	test('shows a row whose content was edited', async () => {
		await tamper(`update audit_row set action = 'other' where stream_id = $1 and seq = 1`);
		expect(await faults()).toEqual([['1', 'hash']]);
	});

	test('shows a row that was dropped, and an end that was cut off', async () => {
		await tamper('delete from audit_row where stream_id = $1');
		expect((await faults()).map(([, why]) => why)).toContain('head');
	});

	test.each(['update audit_row set action = action', 'delete from audit_row'])(
		'is not the application’s to change: %s',
		async (statement) => {
			await expect(application.query(statement)).rejects.toThrow(/permission denied/);
		}
	);
});
