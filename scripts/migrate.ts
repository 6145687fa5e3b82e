import { Kysely, Migrator, PostgresDialect, type Migration } from 'kysely';
import pg from 'pg';
import PgBoss from 'pg-boss';
import { QUEUES, QUEUE_SCHEMA } from '../src/lib/server/jobs/queue';

/** Every grant goes to this group; whichever login the application uses is a member of it. */
const GROUP = 'costmary_application';
/** The queue's own queue for planned jobs; its scheduler would otherwise try to create a table itself. */
const SCHEDULER_QUEUE = '__pgboss__send-it';

const modules = import.meta.glob<Migration>('/migrations/*.ts', { eager: true });

function migrations(): Record<string, Migration> {
	const named = Object.entries(modules).map(([path, module]) => [path.replace(/^.*\/|\.ts$/g, ''), module]);
	return Object.fromEntries(named);
}

function required(name: string): string {
	const value = process.env[name];
	if (!value) throw new Error(`${name} is not set: migrations run as the owner, requests as the application role.`);
	return value;
}

const quoted = (identifier: string) => `"${identifier.replaceAll('"', '""')}"`;

async function migrateToLatest(pool: pg.Pool): Promise<void> {
	const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool }) });
	const migrator = new Migrator({ db, provider: { getMigrations: async () => migrations() } });
	const { error, results = [] } = await migrator.migrateToLatest();
	for (const { migrationName, status } of results) {
		console.log(status === 'Success' ? `applied ${migrationName}` : `${migrationName}: ${status}`);
	}
	if (error) throw error;
}

/** Makes the group if it is missing and puts the application's login into it. */
async function prepareGroup(pool: pg.Pool, login: string): Promise<void> {
	const { rows } = await pool.query<{ present: boolean; member: boolean; privileged: boolean; login: boolean }>(
		`select
			exists (select 1 from pg_roles where rolname = $1) as present,
			exists (select 1 from pg_roles where rolname = $2) as login,
			exists (select 1 from pg_roles where rolname = $2 and (rolsuper or rolbypassrls)) as privileged,
			exists (
				select 1 from pg_auth_members m
				join pg_roles g on g.oid = m.roleid join pg_roles u on u.oid = m.member
				where g.rolname = $1 and u.rolname = $2) as member`,
		[GROUP, login]
	);
	const state = rows[0];
	if (!state?.login) throw new Error(`The role ${login} named by DATABASE_URL does not exist in this cluster.`);
	if (state.privileged) {
		throw new Error(
			`The role ${login} named by DATABASE_URL bypasses row-level security; give the application its own.`
		);
	}
	const statements = [
		...(state.present ? [] : [`create role ${GROUP} nologin`]),
		...(state.member ? [] : [`grant ${GROUP} to ${quoted(login)}`])
	];
	for (const statement of statements) await asAdministrator(pool, statement, statements);
}

/** Roles belong to the whole cluster, so an owner of one database may lack the right to make them. */
async function asAdministrator(pool: pg.Pool, statement: string, all: readonly string[]): Promise<void> {
	try {
		await pool.query(statement);
	} catch (cause) {
		const wanted = all.map((each) => `${each};`).join(' ');
		throw new Error(`The owner role may not manage roles. Let an administrator run once: ${wanted}`, { cause });
	}
}

async function installQueue(pool: pg.Pool, ownerUrl: string): Promise<void> {
	const boss = new PgBoss({
		connectionString: ownerUrl,
		schema: QUEUE_SCHEMA,
		supervise: false,
		schedule: false,
		max: 1
	});
	boss.on('error', (error) => console.error(error.message));
	await boss.start();
	try {
		// Each queue is a table of its own; the application's later createQueue finds it and does nothing.
		for (const queue of [...QUEUES, SCHEDULER_QUEUE]) await boss.createQueue(queue);
	} finally {
		await boss.stop({ graceful: false });
	}
	const schema = quoted(QUEUE_SCHEMA);
	await pool.query(`grant usage on schema ${schema} to ${GROUP}`);
	await pool.query(`grant select, insert, update, delete on all tables in schema ${schema} to ${GROUP}`);
	await pool.query(`grant execute on all functions in schema ${schema} to ${GROUP}`);
}

async function main(): Promise<void> {
	const ownerUrl = required('DATABASE_OWNER_URL');
	const login = decodeURIComponent(new URL(required('DATABASE_URL')).username);
	const pool = new pg.Pool({ connectionString: ownerUrl, max: 2 });
	try {
		await prepareGroup(pool, login);
		await migrateToLatest(pool);
		// The application asks at start whether its newest migration stands here, so it must be able to read the list.
		await pool.query(`grant select on kysely_migration to ${GROUP}`);
		await installQueue(pool, ownerUrl);
	} finally {
		await pool.end().catch(() => undefined);
	}
}

main().catch((error: unknown) => {
	console.error(error instanceof Error ? error.message : error);
	process.exitCode = 1;
});
