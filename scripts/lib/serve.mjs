import { setTimeout as pause } from 'node:timers/promises';
import { ROOT, Stop } from './env.mjs';
import { freePort } from './ports.mjs';

const PREFERRED_PORT = 4310;
const READY_STEPS = 600;
/** An upload's part is 8 MiB; with its envelope it must pass the adapter's limit. */
const BODY_LIMIT = '10M';

/**
 * Starts the web process and waits until it answers.
 * @param {import('./processes.mjs').Processes} processes
 * @param {NodeJS.ProcessEnv} services the variables that lead to the services
 * @param {{ dev?: boolean, port?: number, stdio?: import('node:child_process').StdioOptions }} [options]
 */
export async function startWeb(processes, services, { dev = false, port = PREFERRED_PORT, stdio } = {}) {
	const chosen = await freePort(Number(process.env.PORT ?? port));
	const listening = `http://127.0.0.1:${chosen}`;
	const address = process.env.ORIGIN ?? listening;
	const env = {
		...process.env,
		...services,
		HOST: '127.0.0.1',
		PORT: String(chosen),
		ORIGIN: address,
		BODY_SIZE_LIMIT: BODY_LIMIT
	};
	const vite = [
		'node_modules/vite/bin/vite.js',
		'dev',
		'--host',
		'127.0.0.1',
		'--port',
		String(chosen),
		'--strictPort'
	];
	const child = processes.start({
		name: 'The application',
		command: process.execPath,
		args: dev ? vite : ['build/index.js'],
		cwd: ROOT,
		env,
		stdio: stdio ?? ['ignore', 'inherit', 'inherit']
	});
	await answers(child, `${listening}/healthz`);
	return { child, address, env };
}

/**
 * @param {import('./processes.mjs').Processes} processes
 * @param {NodeJS.ProcessEnv} env
 * @param {import('node:child_process').StdioOptions} [stdio]
 */
export function startWorker(processes, env, stdio) {
	return processes.start({
		name: 'The worker',
		command: process.execPath,
		args: ['build-worker/worker.js'],
		cwd: ROOT,
		env: { ...process.env, ...env },
		stdio: stdio ?? ['ignore', 'inherit', 'inherit']
	});
}

/** @param {import('node:child_process').ChildProcess} child @param {string} url */
async function answers(child, url) {
	for (let step = 0; step < READY_STEPS; step += 1) {
		if (child.exitCode !== null || child.signalCode !== null) {
			throw new Stop('The application did not start; what it printed above says why.');
		}
		try {
			if ((await fetch(url)).ok) return;
		} catch {
			// Not listening yet.
		}
		await pause(100);
	}
	throw new Stop(`The application does not answer at ${url}.`);
}
