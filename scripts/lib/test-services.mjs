import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { startBucket } from './bucket.mjs';
import { migrate, seed } from './data.mjs';
import { dataFolder, openFolder } from './env.mjs';
import { startMail } from './mail.mjs';
import { makeDatabase, sealTemplate, startPostgres } from './postgres.mjs';

/** Copied for each integration file. */
const MIGRATED = 'costmary_template';
/** Copied for each end-to-end file, by the workspace it asks for. */
const WORKSPACES = [
	{ name: 'demo', empty: false },
	{ name: 'empty', empty: true }
];
const ADMINISTRATOR = { email: 'administrator@costmary.example', password: 'a long enough password' };

/** A fresh folder for one run, gone when it ends. @param {import('./processes.mjs').Processes} processes */
export function testFolder(processes) {
	const folder = mkdtempSync(path.join(tmpdir(), 'costmary-test-'));
	processes.atEnd(() => rmSync(folder, { recursive: true, force: true }));
	// mkdtemp closes it to everybody else, PostgreSQL's account included.
	chmodSync(folder, 0o755);
	return dataFolder(folder);
}

/**
 * Database, bucket and mail catcher of one run, and the variables that lead the tests to them.
 * @param {import('./processes.mjs').Processes} processes
 * @param {string} folder
 */
export async function startTestServices(processes, folder) {
	const cluster = await startPostgres(processes, folder);
	const bucket = await startBucket(processes, folder, { controls: true });
	const mail = await startMail(processes, folder);
	await makeDatabase(cluster, MIGRATED);
	const services = { ...bucket, ...mail };
	await migrate(processes, { ...services, ...urls(cluster, MIGRATED) });
	await sealTemplate(cluster, MIGRATED);
	const variables = {
		...services,
		COSTMARY_TEST_SUPERUSER_URL: cluster.url('superuser', 'postgres'),
		COSTMARY_TEST_OWNER_URL: cluster.url('owner', 'postgres'),
		COSTMARY_TEST_APPLICATION_URL: cluster.url('application', 'postgres'),
		COSTMARY_TEST_TEMPLATE: MIGRATED,
		COSTMARY_TEST_FOLDER: folder
	};
	return { cluster, variables, services };
}

/**
 * Fills one template per kind of workspace, once; each end-to-end file works in a copy.
 * @param {import('./processes.mjs').Processes} processes
 * @param {{ cluster: import('./postgres.mjs').Cluster, services: NodeJS.ProcessEnv }} started
 * @param {string} folder
 */
export async function fillWorkspaces(processes, { cluster, services }, folder) {
	for (const { name, empty } of WORKSPACES) {
		const database = `costmary_${name}`;
		await makeDatabase(cluster, database, MIGRATED);
		const account = empty
			? { COSTMARY_ADMIN_EMAIL: ADMINISTRATOR.email, COSTMARY_ADMIN_PASSWORD: ADMINISTRATOR.password }
			: {};
		const own = openFolder(path.join(folder, name));
		await seed(processes, { ...services, ...account, ...urls(cluster, database) }, own, { empty });
		await sealTemplate(cluster, database);
	}
	return {
		COSTMARY_ADMIN_EMAIL: ADMINISTRATOR.email,
		COSTMARY_ADMIN_PASSWORD: ADMINISTRATOR.password
	};
}

/** @param {import('./postgres.mjs').Cluster} cluster @param {string} database */
const urls = (cluster, database) => ({
	DATABASE_URL: cluster.url('application', database),
	DATABASE_OWNER_URL: cluster.url('owner', database)
});
