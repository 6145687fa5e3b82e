import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT, say, Stop } from './env.mjs';
import { postgresBinaries } from './postgres.mjs';

const CLUSTER_SETTING = '/etc/postgresql-common/createcluster.conf';
const START_POLICY = '/usr/sbin/policy-rc.d';

/** What each of Debian's packages is for, and how its presence is told. */
const PACKAGES = {
	'postgresql-15': { what: 'the database', present: () => postgresBinaries() !== null },
	chromium: { what: 'the browser of the end-to-end tests', present: () => existsSync('/usr/bin/chromium') },
	'poppler-utils': { what: 'reading PDF files in the tests', present: () => onPath('pdftotext') && onPath('pdfinfo') },
	qpdf: { what: 'checking PDF files in the tests', present: () => onPath('qpdf') }
};

/** @typedef {keyof typeof PACKAGES} DebianPackage */

/** @type {readonly DebianPackage[]} */
export const TO_RUN = ['postgresql-15'];
/** @type {readonly DebianPackage[]} */
export const TO_TEST = ['postgresql-15', 'chromium', 'poppler-utils', 'qpdf'];

/** @param {string} program */
function onPath(program) {
	const folders = (process.env.PATH ?? '').split(':');
	return folders.some((folder) => folder !== '' && existsSync(path.join(folder, program)));
}

/** @param {string} file @returns {Record<string, { version?: string, integrity?: string, optional?: boolean }>} */
const lockedPackages = (file) => JSON.parse(readFileSync(file, 'utf8')).packages ?? {};

/** npm writes its own list last, so an install that was cut off has none; packages for other systems are not in it. */
function nodeModulesAreCurrent() {
	const installedList = path.join(ROOT, 'node_modules/.package-lock.json');
	if (!existsSync(installedList)) return false;
	const wanted = lockedPackages(path.join(ROOT, 'package-lock.json'));
	const installed = lockedPackages(installedList);
	return Object.entries(wanted).every(([name, { version, integrity, optional }]) => {
		const found = installed[name];
		if (name === '' || (!found && optional)) return true;
		return found?.version === version && found?.integrity === integrity;
	});
}

/** @param {import('./processes.mjs').Processes} processes */
export async function ensureNodeModules(processes) {
	if (nodeModulesAreCurrent()) return;
	say('Installing the packages of package-lock.json …');
	const code = await processes.run({
		name: 'npm ci',
		command: 'npm',
		args: ['ci', '--no-audit', '--no-fund', '--loglevel=error'],
		cwd: ROOT
	});
	if (code !== 0) throw new Stop('npm ci failed; what it printed above says why.');
}

/**
 * @param {import('./processes.mjs').Processes} processes
 * @param {readonly DebianPackage[]} names
 */
export async function ensureDebianPackages(processes, names) {
	const missing = names.filter((name) => !PACKAGES[name].present());
	if (missing.length === 0) return;
	const prefix = administratorPrefix();
	if (prefix === null || !existsSync('/usr/bin/apt-get')) {
		const list = missing.map((name) => `${name} (${PACKAGES[name].what})`).join(', ');
		throw new Stop(`Missing from this machine: ${list}. Install with: apt-get install ${missing.join(' ')}`);
	}
	say(`Installing from Debian: ${missing.join(', ')} …`);
	const undo = missing.includes('postgresql-15') ? preventCluster(prefix) : () => undefined;
	processes.atEnd(undo);
	await aptGet(processes, prefix, ['update', '-q']);
	await aptGet(processes, prefix, [
		'install',
		'-y',
		'-q',
		'--no-install-recommends',
		'-o',
		'Dpkg::Options::=--force-confold',
		...missing
	]);
	undo();
	const still = missing.filter((name) => !PACKAGES[name].present());
	if (still.length > 0) throw new Stop(`${still.join(', ')} could not be installed from Debian.`);
}

/** @returns {string[] | null} what a command needs in front to run as root; null when it cannot */
function administratorPrefix() {
	if (process.getuid?.() === 0) return [];
	return spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0 ? ['sudo', '-n'] : null;
}

/**
 * @param {import('./processes.mjs').Processes} processes
 * @param {string[]} prefix
 * @param {string[]} args
 */
async function aptGet(processes, prefix, args) {
	const settings = ['DEBIAN_FRONTEND=noninteractive', 'LC_ALL=C.UTF-8'];
	const [command = '', ...rest] = [...prefix, 'env', ...settings, 'apt-get', '-o', 'DPkg::Lock::Timeout=300', ...args];
	// Asked to end, apt-get finishes the step it is in; a package left half set up would be worse than a slow Ctrl-C.
	await processes.runQuietly({
		name: `apt-get ${args[0]}`,
		command,
		args: rest,
		cwd: '/',
		signal: 'SIGINT',
		alone: true,
		patience: 120_000
	});
}

/**
 * Debian's package makes a cluster of its own and starts it on the usual port; both are held back.
 * @param {string[]} prefix
 * @returns {() => void} takes the policy away again
 */
function preventCluster(prefix) {
	const asRoot = (/** @type {string} */ script) => {
		const [command = 'sh', ...args] = [...prefix, 'sh', '-c', script];
		spawnSync(command, args, { stdio: 'ignore' });
	};
	if (!existsSync(CLUSTER_SETTING)) {
		asRoot(`mkdir -p /etc/postgresql-common && echo 'create_main_cluster = false' > ${CLUSTER_SETTING}`);
	}
	if (existsSync(START_POLICY)) return () => undefined;
	asRoot(`printf '#!/bin/sh\\nexit 101\\n' > ${START_POLICY} && chmod 755 ${START_POLICY}`);
	let undone = false;
	return () => {
		if (!undone) asRoot(`rm -f ${START_POLICY}`);
		undone = true;
	};
}
