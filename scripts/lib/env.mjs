import { spawnSync } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import { chmodSync, existsSync, lstatSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's folder, whatever folder the command was called from. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

/** The role that owns the tables, and the one the application works under. Migrations grant to the group only. */
export const OWNER_ROLE = 'costmary_owner';
export const APPLICATION_ROLE = 'costmary_app';
export const APPLICATION_GROUP = 'costmary_application';

/** A fault of the surroundings that one sentence explains; it is printed without a stack. */
export class Stop extends Error {}

/** @param {string} sentence */
export const say = (sentence) => console.log(sentence);

export function checkNode() {
	const major = Number(process.versions.node.split('.')[0]);
	if (major !== 20) throw new Stop(`Costmary runs on Node.js 20; this is ${process.version}.`);
}

/**
 * The ids under which PostgreSQL runs: it refuses root, so root lends it the account of Debian's package.
 * @returns {{ uid: number, gid: number } | null} null when the caller is an ordinary user
 */
export function postgresAccount() {
	if (process.getuid?.() !== 0) return null;
	const id = (/** @type {string} */ flag) => Number(spawnSync('id', [flag, 'postgres'], { encoding: 'utf8' }).stdout);
	const account = { uid: id('-u'), gid: id('-g') };
	return Number.isInteger(account.uid) && account.uid > 0 ? account : null;
}

/**
 * Whether PostgreSQL's account can enter a folder: every folder above must let it pass too, so it is simply tried.
 * @param {string} folder
 */
function postgresCanEnter(folder) {
	const account = postgresAccount();
	if (!account) return true;
	const tried = spawnSync('/bin/sh', ['-c', 'cd "$1"', 'sh', folder], { ...account, cwd: '/', stdio: 'ignore' });
	return tried.status === 0;
}

/**
 * Makes a folder others may pass through. mkdir's recursive mode would be given to every new parent, so it is set apart.
 * @param {string} folder
 */
export function openFolder(folder) {
	if (!existsSync(folder)) {
		mkdirSync(folder, { recursive: true });
		chmodSync(folder, 0o755);
	}
	return folder;
}

const fallbackFolder = () => `/var/tmp/costmary-${createHash('sha256').update(ROOT).digest('hex').slice(0, 12)}`;

/** A folder in a place all may write to is used only when it is really ours. @param {string} folder */
function ownFolder(folder) {
	openFolder(folder);
	const status = lstatSync(folder);
	if (!status.isDirectory() || status.uid !== process.getuid?.()) {
		throw new Stop(`${folder} belongs to somebody else; name another folder with COSTMARY_DATA.`);
	}
	return folder;
}

/**
 * Where the data lies: --data, COSTMARY_DATA, or .data in the project; with a closed folder above that, /var/tmp.
 * @param {string | undefined} named
 */
export function dataFolder(named) {
	const chosen = named ?? process.env.COSTMARY_DATA;
	if (chosen) {
		const folder = openFolder(path.resolve(chosen));
		if (postgresCanEnter(folder)) return folder;
		throw new Stop(`PostgreSQL cannot enter ${folder}: a folder above it is closed to others.`);
	}
	const usual = openFolder(path.join(ROOT, '.data'));
	if (postgresCanEnter(usual)) return usual;
	const fallback = ownFolder(fallbackFolder());
	say(`PostgreSQL cannot enter ${usual}, as a folder above it is closed to others; the data lies in ${fallback}.`);
	return fallback;
}

/**
 * Generated once per data folder and kept beside the data, readable by its owner only.
 * @param {string} folder
 * @returns {{ superuser: string, owner: string, application: string, bucketKey: string, bucketSecret: string }}
 */
export function secretsOf(folder) {
	const file = path.join(folder, 'secrets.json');
	if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'));
	const word = () => randomBytes(24).toString('hex');
	const secrets = {
		superuser: word(),
		owner: word(),
		application: word(),
		bucketKey: word().slice(0, 20),
		bucketSecret: word()
	};
	writeFileSync(file, JSON.stringify(secrets), { mode: 0o600 });
	return secrets;
}

/** Which services the environment already names; those are used as they are. */
export function realServices() {
	const named = (/** @type {string} */ prefix) => Object.keys(process.env).some((key) => key.startsWith(prefix));
	if (process.env.DATABASE_OWNER_URL && !process.env.DATABASE_URL) {
		throw new Stop('DATABASE_OWNER_URL is set without DATABASE_URL; set both or none.');
	}
	return { database: Boolean(process.env.DATABASE_URL), bucket: named('S3_'), mail: named('SMTP_') };
}
