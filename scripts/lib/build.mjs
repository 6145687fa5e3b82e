import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { openFolder, ROOT, say } from './env.mjs';
import { takeLock } from './lock.mjs';

const SOURCES = ['src', 'migrations', 'templates', 'static', 'scripts'];
const SETTINGS = ['package-lock.json', 'svelte.config.js', 'tsconfig.json', 'vite.config.ts', 'vite.worker.config.ts'];
const NOT_BUILT = /\.(test|spec)\.ts$|\.mjs$/;
const STAMP = '.sources';

/** Each half of the build, the file that must be there, and how it is made. */
const HALVES = {
	web: { folder: 'build', entry: 'index.js', args: ['build'] },
	worker: { folder: 'build-worker', entry: 'migrate.js', args: ['build', '--config', 'vite.worker.config.ts'] }
};

/** @typedef {keyof typeof HALVES} Half */

/** What the build is made of, as one hash; a file's date says nothing after a checkout. */
function sourcesHash() {
	const hash = createHash('sha256');
	for (const file of [...SOURCES.flatMap(filesBelow), ...SETTINGS]) {
		const full = path.join(ROOT, file);
		if (existsSync(full)) hash.update(`${file}\0`).update(readFileSync(full)).update('\0');
	}
	return hash.digest('hex');
}

/** @param {string} folder @returns {string[]} */
function filesBelow(folder) {
	const full = path.join(ROOT, folder);
	if (!existsSync(full)) return [];
	const entries = readdirSync(full, { recursive: true, withFileTypes: true });
	const files = entries.filter((entry) => entry.isFile() && !NOT_BUILT.test(entry.name));
	return files.map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name))).sort();
}

/** @param {Half} half @param {string} hash */
function isCurrent(half, hash) {
	const { folder, entry } = HALVES[half];
	const stamp = path.join(ROOT, folder, STAMP);
	return existsSync(path.join(ROOT, folder, entry)) && existsSync(stamp) && readFileSync(stamp, 'utf8') === hash;
}

/**
 * Builds the halves whose sources have changed since they were last built.
 * @param {import('./processes.mjs').Processes} processes
 * @param {readonly Half[]} halves
 */
export async function ensureBuilt(processes, halves) {
	// Two commands in one folder must not write the same build at once.
	const folder = openFolder(path.join(ROOT, '.data'));
	let lock = takeLock(folder, 'build.lock');
	while (!lock.taken) {
		await pause(500);
		lock = takeLock(folder, 'build.lock');
	}
	const { release } = lock;
	processes.atEnd(release);
	try {
		const hash = sourcesHash();
		for (const half of halves) if (!isCurrent(half, hash)) await build(processes, half, hash);
	} finally {
		release();
	}
}

/** @param {import('./processes.mjs').Processes} processes @param {Half} half @param {string} hash */
async function build(processes, half, hash) {
	const { folder, args } = HALVES[half];
	say(`Building ${half === 'web' ? 'the application' : 'the worker and the commands'} …`);
	rmSync(path.join(ROOT, folder, STAMP), { force: true });
	await processes.runQuietly({
		name: `vite ${args.join(' ')}`,
		command: process.execPath,
		args: ['node_modules/vite/bin/vite.js', ...args],
		cwd: ROOT
	});
	writeFileSync(path.join(ROOT, folder, STAMP), hash);
}
