import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { beganAt } from './ending.mjs';

/** @typedef {{ pid: number, began: string | null, address?: string }} Holder */

/** @param {string} file @returns {Holder | null} */
function holderOf(file) {
	try {
		const holder = JSON.parse(readFileSync(file, 'utf8'));
		return holder.began !== null && beganAt(holder.pid) === holder.began ? holder : null;
	} catch {
		return null;
	}
}

/**
 * Takes the lock of a data folder for this process. One that a dead process left behind counts as free.
 * @param {string} folder
 * @param {string} name
 * @returns {{ taken: true, note(address: string): void, release(): void } | { taken: false, holder: Holder }}
 */
export function takeLock(folder, name) {
	const file = path.join(folder, name);
	/** @type {Holder} */
	const mine = { pid: process.pid, began: beganAt(process.pid) };
	for (;;) {
		try {
			writeFileSync(file, JSON.stringify(mine), { flag: 'wx' });
			break;
		} catch (error) {
			if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error;
			const holder = holderOf(file);
			if (holder) return { taken: false, holder };
			rmSync(file, { force: true });
		}
	}
	return {
		taken: true,
		note: (address) => writeFileSync(file, JSON.stringify({ ...mine, address })),
		release: () => rmSync(file, { force: true })
	};
}

/** Who holds a lock, if anybody alive does. @param {string} folder @param {string} name */
export const lockHolder = (folder, name) => {
	const file = path.join(folder, name);
	return existsSync(file) ? holderOf(file) : null;
};
