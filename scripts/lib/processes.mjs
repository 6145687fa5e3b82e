import { fork, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { endProcess } from './ending.mjs';
import { say, Stop } from './env.mjs';

/**
 * @typedef {object} Order
 * @property {string} name what a person calls it
 * @property {string} command
 * @property {string[]} args
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env]
 * @property {number} [uid]
 * @property {number} [gid]
 * @property {import('node:child_process').StdioOptions} [stdio]
 * @property {NodeJS.Signals} [signal] how it is asked to end
 * @property {boolean} [alone] ask the process itself, not its group (PostgreSQL passes it on; a package manager must finish)
 * @property {number} [patience] milliseconds until it is ended outright
 */

const EXIT_AFTER_SIGNAL = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129 };
const PATIENCE = 8_000;

/**
 * Everything one command has started. Each child leads a process group of its own, so that Ctrl-C reaches only the
 * command, which then ends its children in order, last started first.
 */
export class Processes {
	/** @type {Map<number, { order: Order, child: import('node:child_process').ChildProcess }>} */
	#running = new Map();
	/** @type {(() => unknown)[]} */
	#cleanups = [];
	/** @type {import('node:child_process').ChildProcess | null} */
	#guard = null;
	/** @type {Promise<void> | null} */
	#ending = null;

	constructor() {
		for (const [signal, code] of Object.entries(EXIT_AFTER_SIGNAL)) {
			process.on(signal, () => void this.endAll().then(() => process.exit(code)));
		}
	}

	get ending() {
		return this.#ending !== null;
	}

	/** Runs when everything is ended, last registered first. @param {() => unknown} cleanup */
	atEnd(cleanup) {
		this.#cleanups.push(cleanup);
	}

	/** Runs after every cleanup. @param {() => unknown} last */
	atVeryEnd(last) {
		this.#cleanups.unshift(last);
	}

	/** @param {Order} order */
	start(order) {
		if (this.#ending) throw new Stop('Stopped.');
		this.#guard ??= this.#startGuard();
		const child = spawn(order.command, order.args, {
			cwd: order.cwd,
			env: order.env ?? process.env,
			uid: order.uid,
			gid: order.gid,
			stdio: order.stdio ?? ['ignore', 'inherit', 'inherit'],
			detached: true
		});
		const { pid } = child;
		if (pid !== undefined) {
			this.#running.set(pid, { order, child });
			this.#guard.send({ add: endingOf(pid, order) });
			child.once('exit', () => {
				this.#running.delete(pid);
				if (this.#guard?.connected) this.#guard.send({ remove: pid });
			});
		}
		return child;
	}

	/**
	 * Runs a command to its end.
	 * @param {Order} order
	 * @returns {Promise<number>} its exit code; 127 when it could not be started
	 */
	run(order) {
		const child = this.start(order);
		return new Promise((resolve) => {
			child.once('error', () => resolve(127));
			child.once('close', (code, signal) => resolve(code ?? (signal ? 1 : 0)));
		});
	}

	/**
	 * Runs a command to its end and keeps what it printed; it is shown only when the command fails.
	 * @param {Order} order
	 */
	async runQuietly(order) {
		const child = this.start({ ...order, stdio: ['ignore', 'pipe', 'pipe'] });
		let printed = '';
		for (const stream of [child.stdout, child.stderr]) stream?.on('data', (chunk) => (printed += chunk));
		const code = await new Promise((resolve) => {
			child.once('error', () => resolve(127));
			child.once('close', (exit) => resolve(exit ?? 1));
		});
		if (code !== 0 && !this.#ending) {
			process.stderr.write(printed);
			throw new Stop(`${order.name} failed with exit code ${code}.`);
		}
		return printed;
	}

	/** Ends one child. @param {import('node:child_process').ChildProcess} child */
	async end(child) {
		const entry = child.pid === undefined ? undefined : this.#running.get(child.pid);
		if (child.pid !== undefined && entry) await endProcess(endingOf(child.pid, entry.order));
	}

	/** Ends the child that was started last. */
	async endNewest() {
		const newest = [...this.#running.values()].at(-1);
		if (newest) await this.end(newest.child);
	}

	/** Ends all children and runs the cleanups; a second call waits for the first. */
	endAll() {
		this.#ending ??= this.#endAll();
		return this.#ending;
	}

	async #endAll() {
		const latestFirst = [...this.#running.entries()].reverse();
		for (const [pid, { order }] of latestFirst) await endProcess(endingOf(pid, order));
		for (const cleanup of [...this.#cleanups].reverse()) {
			try {
				await cleanup();
			} catch (error) {
				say(`While cleaning up: ${error instanceof Error ? error.message : error}`);
			}
		}
		if (this.#guard?.connected) this.#guard.disconnect();
	}

	#startGuard() {
		const guard = fork(fileURLToPath(new URL('./guard.mjs', import.meta.url)), [], {
			detached: true,
			stdio: ['ignore', 'ignore', 'ignore', 'ipc']
		});
		guard.on('error', () => undefined);
		guard.unref();
		guard.channel?.unref?.();
		return guard;
	}
}

/** @param {number} pid @param {Order} order @returns {import('./ending.mjs').Ending} */
const endingOf = (pid, order) => ({
	pid,
	signal: order.signal ?? 'SIGTERM',
	group: !order.alone,
	patience: order.patience ?? PATIENCE
});

/**
 * Runs a command's main function; a fault of the surroundings is one sentence, anything else shows where it arose.
 * @param {(processes: Processes) => Promise<number | void>} main
 */
export async function runCommand(main) {
	const processes = new Processes();
	/** @type {number} */
	let code;
	try {
		code = (await main(processes)) ?? 0;
	} catch (error) {
		// While ending, children fail because they were told to; that is no fault worth a sentence.
		if (!processes.ending) console.error(error instanceof Stop ? error.message : error);
		code = 1;
	}
	// When a signal came first, its handler ends the process with the code that belongs to it.
	const interrupted = processes.ending;
	await processes.endAll();
	if (!interrupted) process.exit(code);
}
