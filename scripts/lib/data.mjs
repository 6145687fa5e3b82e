import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT } from './env.mjs';

/** @typedef {{ email: string, password: string, name?: string, roles?: string[], role?: string }} Account */

const ACCOUNTS = 'demo-accounts.json';

/**
 * Brings a database to the newest migration.
 * @param {import('./processes.mjs').Processes} processes
 * @param {NodeJS.ProcessEnv} services
 */
export function migrate(processes, services) {
	return processes.runQuietly({
		name: 'The migration',
		command: process.execPath,
		args: ['build-worker/migrate.js'],
		cwd: ROOT,
		env: { ...process.env, ...services }
	});
}

/**
 * Fills a new workspace: with the demo, or with one administrator only.
 * @param {import('./processes.mjs').Processes} processes
 * @param {NodeJS.ProcessEnv} services
 * @param {string} folder where the accounts are written
 * @param {{ empty?: boolean }} [options]
 */
export function seed(processes, services, folder, { empty = false } = {}) {
	mkdirSync(folder, { recursive: true });
	return processes.runQuietly({
		name: 'Filling the workspace',
		command: process.execPath,
		args: ['build-worker/demo.js', ...(empty ? ['--empty'] : [])],
		cwd: ROOT,
		env: { ...process.env, ...services, COSTMARY_DATA: folder }
	});
}

/** @param {string} folder @returns {Account[]} */
export function accountsOf(folder) {
	const file = path.join(folder, ACCOUNTS);
	if (!existsSync(file)) return [];
	const kept = JSON.parse(readFileSync(file, 'utf8'));
	return Array.isArray(kept) ? kept : (kept.accounts ?? []);
}

/** @param {string} folder @param {Account[]} accounts */
export const keepAccounts = (folder, accounts) =>
	writeFileSync(path.join(folder, ACCOUNTS), `${JSON.stringify(accounts, null, '\t')}\n`, { mode: 0o600 });

/** Two marks, so that a filling that was cut off is told from one that was finished. */
const BEGUN = 'workspace-begun';
const FILLED = 'workspace-filled';

/** @param {string} folder @returns {'new' | 'cut off' | 'filled'} */
export function workspaceState(folder) {
	if (existsSync(path.join(folder, FILLED))) return 'filled';
	return existsSync(path.join(folder, BEGUN)) ? 'cut off' : 'new';
}

/** @param {string} folder */
export const markBegun = (folder) => writeFileSync(path.join(folder, BEGUN), '');

/** @param {string} folder */
export function markFilled(folder) {
	writeFileSync(path.join(folder, FILLED), '');
	rmSync(path.join(folder, BEGUN), { force: true });
}
