import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdir, readdir, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { freshName, readJson, receive, writeJson } from './files';
import type { Body } from './payload';
import { Problem } from './problem';
import type { About, Store, StoredObject } from './store';

export interface Upload {
	readonly id: string;
	readonly key: string;
	readonly about: About;
	readonly begun: string;
}

export interface Part {
	readonly number: number;
	readonly bytes: number;
	readonly etag: string;
	readonly checksums: Readonly<Record<string, string>>;
	readonly modified: string;
	readonly file: string;
}

/** A part as the request to complete names it. */
export interface NamedPart {
	readonly number: number;
	readonly etag: string;
	readonly checksums: Readonly<Record<string, string>>;
}

const SMALLEST_PART = 5 * 1024 * 1024;
const HIGHEST_PART = 10_000;

export function partNumberOf(text: string): number {
	const number = /^\d{1,5}$/.test(text) ? Number(text) : 0;
	if (number < 1 || number > HIGHEST_PART) {
		throw new Problem('InvalidArgument', `A part number lies between 1 and ${HIGHEST_PART}.`);
	}
	return number;
}

/** Uploads under way: one folder each, with upload.json and per part its content and a JSON file. */
export class Uploads {
	readonly #folder: string;
	readonly #store: Store;
	/** Uploads being completed: a second request to complete one waits for none of this and is refused. */
	readonly #closing = new Set<string>();

	private constructor(folder: string, store: Store) {
		this.#folder = join(folder, 'uploads');
		this.#store = store;
	}

	static async open(folder: string, store: Store): Promise<Uploads> {
		const uploads = new Uploads(folder, store);
		await mkdir(uploads.#folder, { recursive: true });
		return uploads;
	}

	async begin(key: string, about: About): Promise<Upload> {
		const upload: Upload = { id: freshName(), key, about, begun: new Date().toISOString() };
		await mkdir(join(this.#folder, upload.id));
		await writeJson(this.#store.temporary, join(this.#folder, upload.id, 'upload.json'), upload);
		return upload;
	}

	async find(id: string, key: string): Promise<Upload> {
		const gone = new Problem('NoSuchUpload', 'There is no such upload under this key.');
		if (!/^[0-9a-f]{24}$/.test(id) || this.#closing.has(id)) throw gone;
		const upload = await readJson<Upload>(join(this.#folder, id, 'upload.json')).catch(() => {
			throw gone;
		});
		if (upload.key !== key) throw gone;
		return upload;
	}

	async part(upload: Upload, number: number, body: Body): Promise<Part> {
		const received = await receive(this.#store.temporary, body);
		const folder = join(this.#folder, upload.id);
		const file = `${number}.${freshName()}`;
		const { bytes, md5: etag } = received;
		const part: Part = { number, bytes, etag, checksums: body.checksums, modified: new Date().toISOString(), file };
		try {
			await rename(received.path, join(folder, file));
			await writeJson(this.#store.temporary, join(folder, `${number}.json`), part);
		} catch {
			// The folder went away while the part was travelling: the upload was aborted.
			await rm(received.path, { force: true });
			throw new Problem('NoSuchUpload', 'The upload was completed or aborted.');
		}
		return part;
	}

	async parts(upload: Upload): Promise<readonly Part[]> {
		const folder = join(this.#folder, upload.id);
		const names = (await readdir(folder)).filter((name) => /^\d+\.json$/.test(name));
		const parts = await Promise.all(names.map((name) => readJson<Part>(join(folder, name))));
		return parts.sort((a, b) => a.number - b.number);
	}

	async complete(upload: Upload, named: readonly NamedPart[], onlyNew: boolean): Promise<StoredObject> {
		const chosen = choose(await this.parts(upload), named);
		this.#closing.add(upload.id);
		try {
			const received = await this.#store.receive(this.#contentOf(upload, chosen));
			const object = await this.#store.commit(received, upload.key, upload.about, {
				onlyNew,
				etag: joinedEtag(chosen)
			});
			await this.#remove(upload.id);
			return object;
		} finally {
			this.#closing.delete(upload.id);
		}
	}

	async *#contentOf(upload: Upload, parts: readonly Part[]): AsyncGenerator<Uint8Array> {
		for (const part of parts) yield* createReadStream(join(this.#folder, upload.id, part.file));
	}

	async abort(upload: Upload): Promise<void> {
		await this.#remove(upload.id);
	}

	#remove(id: string): Promise<void> {
		return rm(join(this.#folder, id), { recursive: true, force: true });
	}

	async list(): Promise<readonly Upload[]> {
		const ids = await readdir(this.#folder);
		const uploads = await Promise.all(ids.map((id) => readJson<Upload>(join(this.#folder, id, 'upload.json'))));
		return uploads.sort(
			(a, b) => Buffer.compare(Buffer.from(a.key), Buffer.from(b.key)) || (a.begun < b.begun ? -1 : 1)
		);
	}

	async clear(): Promise<void> {
		await Promise.all((await readdir(this.#folder)).map((id) => this.#remove(id)));
	}
}

function choose(stored: readonly Part[], named: readonly NamedPart[]): readonly Part[] {
	if (named.length === 0) throw new Problem('MalformedXML', 'No part is named.');
	if (named.some((part, index) => index > 0 && part.number <= (named[index - 1]?.number ?? 0))) {
		throw new Problem('InvalidPartOrder', 'The parts are not in ascending order.');
	}
	const byNumber = new Map(stored.map((part) => [part.number, part]));
	return named.map((wanted, index) => {
		const part = byNumber.get(wanted.number);
		const fits =
			part?.etag === wanted.etag &&
			Object.entries(wanted.checksums).every(([name, value]) => part.checksums[name] === value);
		if (!part || !fits) throw new Problem('InvalidPart', `Part ${wanted.number} is not there as named.`);
		if (index < named.length - 1 && part.bytes < SMALLEST_PART) {
			throw new Problem(
				'EntityTooSmall',
				`Part ${part.number} is smaller than ${SMALLEST_PART} bytes and not the last.`
			);
		}
		return part;
	});
}

/** As real buckets form it: the hash of the parts' hashes and their number. */
function joinedEtag(parts: readonly Part[]): string {
	const hash = createHash('md5');
	for (const part of parts) hash.update(Buffer.from(part.etag, 'hex'));
	return `${hash.digest('hex')}-${parts.length}`;
}
