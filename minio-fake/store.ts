import { createHash } from 'node:crypto';
import { mkdir, open, readdir, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import { freshName, readJson, receive, writeJson, type Received } from './files';
import { Problem } from './problem';

/** What a writer says about an object and a reader gets back. */
export interface About {
	/** Content-Type and its kin, by lower-case header name. */
	readonly headers: Readonly<Record<string, string>>;
	/** x-amz-meta-*, without the prefix. */
	readonly meta: Readonly<Record<string, string>>;
	/** Base64 by checksum name. */
	readonly checksums: Readonly<Record<string, string>>;
}

export interface StoredObject extends About {
	readonly key: string;
	readonly bytes: number;
	/** Without quotation marks. */
	readonly etag: string;
	readonly modified: string;
	/** The name of the file that holds the content. */
	readonly file: string;
}

export interface ByteRange {
	readonly start: number;
	readonly end: number;
}

export const fileNameOf = (key: string): string => createHash('sha256').update(key).digest('hex');

/**
 * The objects of the bucket on disk. Content lies under the sha256 of its key and a fresh ending; the JSON
 * file beside it names the content, so replacing that one small file is what makes a write happen.
 * No key ever becomes a path. One process owns a folder at a time.
 */
export class Store {
	readonly #objects: string;
	readonly temporary: string;
	readonly #index = new Map<string, StoredObject>();
	#turn: Promise<unknown> = Promise.resolve();

	private constructor(folder: string) {
		this.#objects = join(folder, 'objects');
		this.temporary = join(folder, 'tmp');
	}

	static async open(folder: string): Promise<Store> {
		const store = new Store(folder);
		await rm(store.temporary, { recursive: true, force: true });
		await mkdir(store.#objects, { recursive: true });
		await mkdir(store.temporary, { recursive: true });
		await store.#load();
		return store;
	}

	/** Reads every JSON file and drops content that no JSON file names: what a crash left behind. */
	async #load(): Promise<void> {
		const names = await readdir(this.#objects);
		for (const name of names.filter((each) => each.endsWith('.json'))) {
			const object = await readJson<StoredObject>(join(this.#objects, name));
			this.#index.set(object.key, object);
		}
		const used = new Set([...this.#index.values()].map((object) => object.file));
		const stray = names.filter((name) => !name.endsWith('.json') && !used.has(name));
		await Promise.all(stray.map((name) => rm(join(this.#objects, name), { force: true })));
	}

	receive(body: AsyncIterable<Uint8Array>): Promise<Received> {
		return receive(this.temporary, body);
	}

	/** Changes happen one after the other, so that the files and the index can never disagree. */
	#inTurn<T>(change: () => Promise<T>): Promise<T> {
		const result = this.#turn.then(change);
		this.#turn = result.catch(() => undefined);
		return result;
	}

	/** Gives received content its key. `onlyNew` is If-None-Match: *. */
	commit(
		received: Received,
		key: string,
		about: About,
		{ onlyNew = false, etag = received.md5 }: { onlyNew?: boolean; etag?: string } = {}
	): Promise<StoredObject> {
		return this.#inTurn(async () => {
			const before = this.#index.get(key);
			if (onlyNew && before) {
				await rm(received.path, { force: true });
				throw new Problem('PreconditionFailed', 'An object with this key exists.');
			}
			const file = `${fileNameOf(key)}.${freshName()}`;
			const { bytes } = received;
			const object: StoredObject = { ...about, key, bytes, etag, modified: new Date().toISOString(), file };
			await rename(received.path, join(this.#objects, file));
			await writeJson(this.temporary, join(this.#objects, `${fileNameOf(key)}.json`), object);
			this.#index.set(key, object);
			if (before) await rm(join(this.#objects, before.file), { force: true });
			return object;
		});
	}

	find(key: string): StoredObject {
		const object = this.#index.get(key);
		if (!object) throw new Problem('NoSuchKey', 'The key does not exist.');
		return object;
	}

	/** Opened before it is answered: from then on the content stays readable, even if the key is removed. */
	async read(object: StoredObject, range?: ByteRange): Promise<Readable> {
		const handle = await open(join(this.#objects, object.file)).catch(() => {
			throw new Problem('NoSuchKey', 'The key does not exist any more.');
		});
		return handle.createReadStream(range);
	}

	remove(key: string): Promise<void> {
		return this.#inTurn(async () => {
			const object = this.#index.get(key);
			if (!object) return;
			this.#index.delete(key);
			await rm(join(this.#objects, `${fileNameOf(key)}.json`), { force: true });
			await rm(join(this.#objects, object.file), { force: true });
		});
	}

	/** In the order of their UTF-8 bytes, as a bucket lists them. */
	list(): readonly StoredObject[] {
		return [...this.#index.values()].sort((a, b) => Buffer.compare(Buffer.from(a.key), Buffer.from(b.key)));
	}

	async clear(): Promise<void> {
		await Promise.all([...this.#index.keys()].map((key) => this.remove(key)));
	}
}
