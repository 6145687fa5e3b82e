import { createHash, randomBytes } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

/** A body that has arrived whole and whose promises held, still under a temporary name. */
export interface Received {
	readonly path: string;
	readonly bytes: number;
	readonly md5: string;
}

export const freshName = (): string => randomBytes(12).toString('hex');

/**
 * Writes a body to a temporary file in one pass. Whatever goes wrong (a cut connection, a broken promise),
 * the temporary file is gone afterwards.
 */
export async function receive(folder: string, body: AsyncIterable<Uint8Array>): Promise<Received> {
	const path = join(folder, freshName());
	const md5 = createHash('md5');
	let bytes = 0;
	async function* counted(): AsyncGenerator<Uint8Array> {
		for await (const piece of body) {
			md5.update(piece);
			bytes += piece.length;
			yield piece;
		}
	}
	try {
		await pipeline(Readable.from(counted(), { objectMode: false }), createWriteStream(path, { flags: 'wx' }));
	} catch (error) {
		await rm(path, { force: true });
		throw error;
	}
	return { path, bytes, md5: md5.digest('hex') };
}

/** Written beside and renamed over, so that a reader or a crash never meets half a file. */
export async function writeJson(folder: string, path: string, value: unknown): Promise<void> {
	const temporary = join(folder, freshName());
	await writeFile(temporary, JSON.stringify(value));
	await rename(temporary, path);
}

export async function readJson<T>(path: string): Promise<T> {
	return JSON.parse(await readFile(path, 'utf8')) as T;
}
