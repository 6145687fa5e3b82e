import { paths } from '../paths';
import { fileFault, partsOf } from './rules';
import type { FileFault } from './rules';

export type UploadState = 'refused' | 'waiting' | 'sending' | 'finishing' | 'done' | 'failed' | 'cancelled';

/** Why an upload failed: a refusal by code, the server's own sentence, or a server that could not be reached. */
export type UploadProblem =
	| { readonly kind: 'refused'; readonly code: string; readonly data: Readonly<Record<string, unknown>> }
	| { readonly kind: 'said'; readonly text: string }
	| { readonly kind: 'lost' };

/** One file on its way. `result` is what `complete` answered. */
export class Upload<Result = unknown> {
	readonly key: number;
	readonly file: File;
	state = $state<UploadState>('waiting');
	sent = $state(0);
	fault = $state<FileFault | null>(null);
	problem = $state.raw<UploadProblem | null>(null);
	result = $state.raw<Result | null>(null);
	id: string | null = null;
	readonly abort = new AbortController();

	constructor(key: number, file: File) {
		this.key = key;
		this.file = file;
		this.fault = fileFault(file.size);
		if (this.fault) this.state = 'refused';
	}
	get name() {
		return this.file.name;
	}
	get bytes() {
		return this.file.size;
	}
	get running() {
		return this.state === 'waiting' || this.state === 'sending' || this.state === 'finishing';
	}
}

class Failed extends Error {
	constructor(readonly problem: UploadProblem) {
		super(problem.kind);
	}
}

const isRecord = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null;

/** Reads a refusal (`code`, `data`) or the sentence of a problem+json answer; the status where neither speaks. */
async function problemOf(response: Response): Promise<UploadProblem> {
	const body: unknown = await response.json().catch(() => null);
	if (isRecord(body)) {
		if (typeof body.code === 'string') {
			return { kind: 'refused', code: body.code, data: isRecord(body.data) ? body.data : {} };
		}
		for (const text of [body.detail, body.title, body.message]) {
			if (typeof text === 'string' && text !== '') return { kind: 'said', text };
		}
	}
	return { kind: 'said', text: String(response.status) };
}

interface Opened {
	readonly id: string;
	readonly partBytes: number;
}

const ATTEMPTS = 3;

export interface UploaderOptions<Result> {
	/** What the files are for, as the server names it. */
	readonly purpose: string;
	/** What each file is to be filed as; without it the file is stored and filed later. */
	readonly document?: (file: File) => object;
	readonly fetch?: typeof fetch;
	/** Called with the answer of `complete` for each file that is stored. */
	readonly ondone?: (result: Result, upload: Upload<Result>) => void;
}

/** Sends files in parts, one file after the other. What is refused is named before its first byte is sent. */
export class Uploader<Result = unknown> {
	uploads = $state.raw<readonly Upload<Result>[]>([]);
	#next = 0;
	#working = false;
	readonly #options: UploaderOptions<Result>;
	readonly #fetch: typeof fetch;

	constructor(options: UploaderOptions<Result>) {
		this.#options = options;
		this.#fetch = options.fetch ?? ((...args) => fetch(...args));
	}

	get busy() {
		return this.uploads.some((upload) => upload.running);
	}

	/** Takes files on; resolves when every one of them is stored, refused, cancelled or failed. */
	async start(files: Iterable<File>): Promise<void> {
		const added = [...files].map((file) => new Upload<Result>(this.#next++, file));
		this.uploads = [...this.uploads, ...added];
		await this.#work();
	}

	/** Sends a failed or cancelled file once more, as a new upload. */
	async retry(upload: Upload<Result>): Promise<void> {
		this.dismiss(upload);
		await this.start([upload.file]);
	}

	/** Stops a file; what was sent of it is thrown away at once. */
	async cancel(upload: Upload<Result>): Promise<void> {
		if (!upload.running) return;
		upload.state = 'cancelled';
		upload.abort.abort();
		await this.#discard(upload);
	}

	dismiss(upload: Upload<Result>): void {
		if (!upload.running) this.uploads = this.uploads.filter((each) => each !== upload);
	}

	async #work(): Promise<void> {
		if (this.#working) return;
		this.#working = true;
		for (;;) {
			const next = this.uploads.find((upload) => upload.state === 'waiting');
			if (!next) break;
			await this.#send(next);
		}
		this.#working = false;
	}

	#completion(upload: Upload<Result>): RequestInit {
		const { document } = this.#options;
		if (!document) return { method: 'POST' };
		return {
			method: 'POST',
			headers: { 'content-type': 'application/json' },
			body: JSON.stringify({ document: document(upload.file) })
		};
	}

	async #send(upload: Upload<Result>): Promise<void> {
		upload.state = 'sending';
		try {
			const opened = await this.#open(upload);
			for (const part of partsOf(upload.bytes, opened.partBytes)) {
				const body = upload.file.slice(part.from, part.to);
				// Without a type of its own a slice would reach the server as no body at all.
				const headers = { 'content-type': 'application/octet-stream' };
				await this.#ask(
					upload,
					paths.api.uploadPart(opened.id, part.number),
					{ method: 'PUT', headers, body },
					ATTEMPTS
				);
				upload.sent = part.to;
			}
			upload.state = 'finishing';
			const answer = await this.#ask(upload, paths.api.uploadComplete(opened.id), this.#completion(upload));
			upload.result = (await answer.json()) as Result;
			upload.state = 'done';
			this.#options.ondone?.(upload.result, upload);
		} catch (thrown) {
			if (upload.abort.signal.aborted) return;
			upload.state = 'failed';
			upload.problem = thrown instanceof Failed ? thrown.problem : { kind: 'lost' };
			await this.#discard(upload);
		}
	}

	async #open(upload: Upload<Result>): Promise<Opened> {
		const { name, bytes } = upload;
		const answer = await this.#ask(upload, paths.api.uploads(), {
			method: 'POST',
			headers: { 'content-type': 'application/json' },
			body: JSON.stringify({ name, bytes, purpose: this.#options.purpose })
		});
		const opened = (await answer.json()) as Opened;
		upload.id = opened.id;
		// Cancelled while the answer was under way: the server must hear of it all the same.
		if (upload.abort.signal.aborted) await this.#discard(upload);
		upload.abort.signal.throwIfAborted();
		return opened;
	}

	/** A lost connection is tried again; a refusal is not. */
	async #ask(upload: Upload<Result>, path: string, init: RequestInit, attempts = 1): Promise<Response> {
		for (let attempt = 1; ; attempt++) {
			let response;
			try {
				response = await this.#fetch(path, { ...init, signal: upload.abort.signal });
			} catch (thrown) {
				if (attempt >= attempts || upload.abort.signal.aborted) throw thrown;
				continue;
			}
			if (response.ok) return response;
			throw new Failed(await problemOf(response));
		}
	}

	/** The server sweeps what nobody throws away, so a failure here loses nothing. */
	async #discard(upload: Upload<Result>): Promise<void> {
		if (!upload.id) return;
		const id = upload.id;
		upload.id = null;
		await this.#fetch(paths.api.upload(id), { method: 'DELETE' }).catch(() => undefined);
	}
}
