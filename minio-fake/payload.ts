import { createHash, type Hash } from 'node:crypto';
import { queryValue, type Query } from './address';
import {
	checksumHeader,
	checksumOfHeader,
	CHECKSUM_NAMES,
	startChecksum,
	type Checksum,
	type ChecksumName
} from './checksums';
import { unchunk, type Framing } from './chunked';
import { Problem } from './problem';
import type { Headers, Verified } from './sigv4';

const LARGEST_BODY = 5 * 1024 ** 3;
const STREAMING = new Map<string, { signed: boolean; trailer: boolean }>([
	['STREAMING-UNSIGNED-PAYLOAD-TRAILER', { signed: false, trailer: true }],
	['STREAMING-AWS4-HMAC-SHA256-PAYLOAD', { signed: true, trailer: false }],
	['STREAMING-AWS4-HMAC-SHA256-PAYLOAD-TRAILER', { signed: true, trailer: true }]
]);

const isSha256 = (text: string): boolean => /^[0-9a-f]{64}$/.test(text);

interface Promised {
	readonly name: ChecksumName;
	readonly running: Checksum;
	/** Null until the trailer brings it. */
	value: string | null;
}

function lengthHeader(headers: Headers, name: string): number | null {
	const text = headers.get(name);
	if (text === undefined) return null;
	if (!/^\d{1,12}$/.test(text)) throw new Problem('InvalidArgument', `${name} is not a length.`);
	return Number(text);
}

/**
 * A request's body with every promise made about it: the hash that was signed, its length, Content-MD5 and the
 * x-amz-checksum-* of headers and trailers. Reading it to the end throws a Problem unless all of them hold,
 * so what has been read counts only afterwards.
 */
export class Body {
	readonly #source: AsyncIterable<Uint8Array>;
	readonly #verified: Verified;
	readonly #framing: Framing | null;
	readonly #length: number | null;
	readonly #promised: readonly Promised[];
	readonly #md5: string | null;
	readonly #trailerName: string | null;
	#read = 0;

	constructor(source: AsyncIterable<Uint8Array>, headers: Headers, query: Query, verified: Verified) {
		const streaming = STREAMING.get(verified.payload);
		if (!streaming && verified.payload !== 'UNSIGNED-PAYLOAD' && !isSha256(verified.payload)) {
			throw new Problem('NotImplemented', `The payload kind ${verified.payload} is not understood.`);
		}
		this.#source = source;
		this.#verified = verified;
		this.#framing = streaming ? { signedFrom: streaming.signed ? verified : null, trailer: streaming.trailer } : null;
		this.#length = lengthHeader(headers, streaming ? 'x-amz-decoded-content-length' : 'content-length');
		this.#md5 = headers.get('content-md5') ?? null;
		this.#trailerName = streaming?.trailer ? (headers.get('x-amz-trailer')?.toLowerCase() ?? null) : null;
		this.#promised = this.#promises(headers, query);
	}

	/** The checksums that were promised and held; complete once the body has been read. */
	get checksums(): Readonly<Record<string, string>> {
		return Object.fromEntries(this.#promised.map(({ name, value }) => [name, value ?? '']));
	}

	/** Refuses a body whose length is not known beforehand, as a real bucket does for an object or a part. */
	assertLength(): void {
		if (this.#length === null) throw new Problem('MissingContentLength', 'The length of the body must be given.');
		if (this.#length > LARGEST_BODY) throw new Problem('EntityTooLarge', 'The body is larger than 5 GiB.');
	}

	#promises(headers: Headers, query: Query): readonly Promised[] {
		const inHeaders = CHECKSUM_NAMES.flatMap((name): Promised[] => {
			const value = headers.get(checksumHeader(name)) ?? queryValue(query, checksumHeader(name));
			return value === undefined ? [] : [{ name, running: startChecksum(name), value }];
		});
		if (this.#trailerName === null) return inHeaders;
		const name = checksumOfHeader(this.#trailerName);
		if (!name) throw new Problem('InvalidRequest', `The trailer ${this.#trailerName} is not understood.`);
		return [...inHeaders, { name, running: startChecksum(name), value: null }];
	}

	#takeTrailers(trailers: ReadonlyMap<string, string>): void {
		const strangers = [...trailers.keys()].filter((name) => name !== this.#trailerName);
		if (strangers.length > 0) throw new Problem('MalformedTrailerError', `Not announced: ${strangers.join(', ')}.`);
		for (const promise of this.#promised) {
			promise.value ??= trailers.get(checksumHeader(promise.name)) ?? null;
			if (promise.value === null) throw new Problem('MalformedTrailerError', 'The announced trailer is missing.');
		}
	}

	async *[Symbol.asyncIterator](): AsyncGenerator<Uint8Array> {
		const sha256 = createHash('sha256');
		const md5 = createHash('md5');
		const content = this.#framing
			? unchunk(this.#source, this.#framing, (trailers) => this.#takeTrailers(trailers))
			: this.#source;
		for await (const piece of content) {
			this.#read += piece.length;
			if (this.#length !== null && this.#read > this.#length) {
				throw new Problem('IncompleteBody', 'The body is longer than its stated length.');
			}
			if (isSha256(this.#verified.payload)) sha256.update(piece);
			if (this.#md5 !== null) md5.update(piece);
			for (const { running } of this.#promised) running.update(piece);
			yield piece;
		}
		this.#assertPromises(sha256, md5);
	}

	#assertPromises(sha256: Hash, md5: Hash): void {
		if (this.#length !== null && this.#read !== this.#length) {
			throw new Problem('IncompleteBody', `The body has ${this.#read} bytes where ${this.#length} were stated.`);
		}
		if (isSha256(this.#verified.payload) && sha256.digest('hex') !== this.#verified.payload) {
			throw new Problem('XAmzContentSHA256Mismatch', 'The body does not have the hash that was signed.');
		}
		if (this.#md5 !== null && md5.digest('base64') !== this.#md5) {
			throw new Problem('BadDigest', 'The body does not match Content-MD5.');
		}
		for (const { name, running, value } of this.#promised) {
			if (running.digest() !== value) throw new Problem('BadDigest', `The body does not match its ${name} checksum.`);
		}
	}

	/** The whole body as text; only for the small XML requests. */
	async text(limit: number): Promise<string> {
		const pieces: Uint8Array[] = [];
		let bytes = 0;
		for await (const piece of this) {
			bytes += piece.length;
			if (bytes > limit) throw new Problem('MalformedXML', 'The request document is too long.');
			pieces.push(piece);
		}
		return Buffer.concat(pieces).toString('utf8');
	}
}
