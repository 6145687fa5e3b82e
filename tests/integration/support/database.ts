import { randomUUID } from 'node:crypto';
import pg from 'pg';

/** Which of the three logins a connection uses: the application's is bound by row-level security, the owner's is not. */
export type Login = 'superuser' | 'owner' | 'application';

const VARIABLE = {
	superuser: 'COSTMARY_TEST_SUPERUSER_URL',
	owner: 'COSTMARY_TEST_OWNER_URL',
	application: 'COSTMARY_TEST_APPLICATION_URL'
} as const satisfies Record<Login, string>;

const TEMPLATE_IS_BUSY = '55006';
const ATTEMPTS = 20;

export interface TestDatabase {
	readonly name: string;
	url(login: Login): string;
	/** A connection beside the application's own, to look at what it left or to act as another login. */
	connect(login: Login): Promise<pg.Client>;
	drop(): Promise<void>;
}

export function testVariable(name: string): string {
	const value = process.env[name];
	if (!value) throw new Error(`${name} is not set: run these tests with npm run test:integration (or test:e2e).`);
	return value;
}

function urlOf(login: Login, database: string): string {
	const url = new URL(testVariable(VARIABLE[login]));
	url.pathname = `/${database}`;
	return url.href;
}

async function connected(url: string): Promise<pg.Client> {
	const client = new pg.Client({ connectionString: url });
	// A database that is dropped ends its connections; that is no fault of the test that is over.
	client.on('error', () => undefined);
	await client.connect();
	return client;
}

async function asSuperuser(statement: string): Promise<void> {
	const client = await connected(urlOf('superuser', 'postgres'));
	try {
		await client.query(statement);
	} finally {
		await client.end();
	}
}

/** A database of its own, copied from the migrated template (or another one), so that no test sees another's rows. */
export async function createDatabase(template = testVariable('COSTMARY_TEST_TEMPLATE')): Promise<TestDatabase> {
	const name = `test_${randomUUID().replaceAll('-', '')}`;
	await copyTemplate(name, template);
	return {
		name,
		url: (login) => urlOf(login, name),
		connect: (login) => connected(urlOf(login, name)),
		drop: () => asSuperuser(`drop database if exists ${name} with (force)`)
	};
}

async function copyTemplate(name: string, template: string): Promise<void> {
	for (let attempt = 1; ; attempt += 1) {
		try {
			return await asSuperuser(`create database ${name} template ${template} owner costmary_owner`);
		} catch (error) {
			const busy = error instanceof pg.DatabaseError && error.code === TEMPLATE_IS_BUSY;
			if (!busy || attempt === ATTEMPTS) throw error;
		}
	}
}
