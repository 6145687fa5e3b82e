import { randomBytes } from 'node:crypto';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { startBucket } from './lib/bucket.mjs';
import { ensureBuilt } from './lib/build.mjs';
import { accountsOf, keepAccounts, markBegun, markFilled, migrate, seed, workspaceState } from './lib/data.mjs';
import { checkNode, dataFolder, realServices, say, Stop } from './lib/env.mjs';
import { ensureDebianPackages, ensureNodeModules, TO_RUN } from './lib/install.mjs';
import { takeLock } from './lib/lock.mjs';
import { startMail } from './lib/mail.mjs';
import { dropDatabase, makeDatabase, startPostgres } from './lib/postgres.mjs';
import { runCommand } from './lib/processes.mjs';
import { startWeb, startWorker } from './lib/serve.mjs';

const DATABASE = 'costmary';

const { values: options } = parseArgs({
	options: {
		data: { type: 'string' },
		dev: { type: 'boolean', default: false },
		'no-demo': { type: 'boolean', default: false }
	}
});

await runCommand(async (processes) => {
	checkNode();
	const real = realServices();
	await ensureNodeModules(processes);
	if (!real.database) await ensureDebianPackages(processes, TO_RUN);
	const folder = dataFolder(options.data);
	const lock = hold(processes, folder);
	await ensureBuilt(processes, options.dev ? ['worker'] : ['web', 'worker']);

	const cluster = real.database ? null : await startPostgres(processes, folder);
	const services = {
		...(cluster ? databaseVariables(cluster) : {}),
		...(real.bucket ? {} : await startBucket(processes, folder)),
		...(real.mail ? {} : await startMail(processes, folder))
	};
	if (cluster) await prepareLocal(processes, cluster, services, folder);
	else await prepareReal(processes, services);

	const web = await startWeb(processes, services, { dev: options.dev });
	const worker = startWorker(processes, web.env);
	lock.note(web.address);
	announce(web.address, folder, cluster !== null);
	await firstToEnd(processes, [web.child, worker]);
});

/** @param {import('./lib/processes.mjs').Processes} processes @param {string} folder */
function hold(processes, folder) {
	const lock = takeLock(folder, 'start.lock');
	if (!lock.taken) {
		const where = lock.holder.address ? ` at ${lock.holder.address}` : '';
		throw new Stop(`Costmary already runs from this folder${where} (process ${lock.holder.pid}).`);
	}
	processes.atEnd(lock.release);
	return lock;
}

/** @param {import('./lib/postgres.mjs').Cluster} cluster */
function databaseVariables(cluster) {
	return {
		DATABASE_URL: cluster.url('application', DATABASE),
		DATABASE_OWNER_URL: cluster.url('owner', DATABASE)
	};
}

/**
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {import('./lib/postgres.mjs').Cluster} cluster
 * @param {NodeJS.ProcessEnv} services
 * @param {string} folder
 */
async function prepareLocal(processes, cluster, services, folder) {
	const state = workspaceState(folder);
	// Nobody can have worked in a workspace whose filling was cut off, so it is made anew.
	if (state === 'cut off') await dropDatabase(cluster, DATABASE);
	await makeDatabase(cluster, DATABASE);
	await migrate(processes, services);
	if (state === 'filled') return;
	markBegun(folder);
	if (options['no-demo']) await fillEmpty(processes, services, folder);
	else {
		say('Filling the workspace with the demo …');
		await seed(processes, services, folder);
	}
	markFilled(folder);
}

/**
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {NodeJS.ProcessEnv} services
 * @param {string} folder
 */
async function fillEmpty(processes, services, folder) {
	const email = process.env.COSTMARY_ADMIN_EMAIL ?? 'administrator@costmary.example';
	const password = process.env.COSTMARY_ADMIN_PASSWORD ?? randomBytes(9).toString('base64url');
	const account = { COSTMARY_ADMIN_EMAIL: email, COSTMARY_ADMIN_PASSWORD: password };
	await seed(processes, { ...services, ...account }, folder, { empty: true });
	keepAccounts(folder, [{ email, password, role: 'administrator' }]);
}

/** @param {import('./lib/processes.mjs').Processes} processes @param {NodeJS.ProcessEnv} services */
async function prepareReal(processes, services) {
	if (process.env.DATABASE_OWNER_URL) await migrate(processes, services);
	else say('DATABASE_OWNER_URL is not set, so the database is used as it is, without migrating.');
}

/** @param {string} address @param {string} folder @param {boolean} local */
function announce(address, folder, local) {
	say(`\nCostmary runs at ${address}\n`);
	const accounts = local ? accountsOf(folder) : [];
	const width = Math.max(0, ...accounts.map(({ email }) => email.length));
	for (const { email, password, role, roles } of accounts) {
		say(`  ${email.padEnd(width)}  ${password}  ${roles?.join(', ') ?? role ?? ''}`);
	}
	const near = path.relative(process.cwd(), folder);
	say(`${accounts.length > 0 ? '\n' : ''}Ctrl-C ends it. Data: ${near.startsWith('..') ? folder : near}`);
}

/**
 * @param {import('./lib/processes.mjs').Processes} processes
 * @param {import('node:child_process').ChildProcess[]} children
 */
async function firstToEnd(processes, children) {
	const ended = children.map((child) => new Promise((resolve) => child.once('exit', () => resolve(child))));
	const first = await Promise.race(ended);
	if (processes.ending) return;
	throw new Stop(
		`${first === children[0] ? 'The application' : 'The worker'} has ended by itself; everything is stopped.`
	);
}
