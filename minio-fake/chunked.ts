import { createHash } from 'node:crypto';
import { Problem } from './problem';
import { hmacHex, sameSignature, sha256Hex, type Verified } from './sigv4';

/** What the framing of an aws-chunked body promises. */
export interface Framing {
	/** Null when the chunks carry no signatures (STREAMING-UNSIGNED-PAYLOAD-TRAILER). */
	readonly signedFrom: Verified | null;
	readonly trailer: boolean;
}

const LONGEST_LINE = 8 * 1024;
const EMPTY_HASH = sha256Hex('');
const TRAILER_SIGNATURE = 'x-amz-trailer-signature';

/** Pulls lines and exact byte counts out of a stream without ever holding more than a piece of it. */
class Reader {
	#source: AsyncIterator<Uint8Array>;
	#held: Buffer = Buffer.alloc(0);

	constructor(source: AsyncIterable<Uint8Array>) {
		this.#source = source[Symbol.asyncIterator]();
	}

	async #more(): Promise<boolean> {
		const next = await this.#source.next();
		if (next.done) return false;
		this.#held = this.#held.length === 0 ? Buffer.from(next.value) : Buffer.concat([this.#held, next.value]);
		return true;
	}

	async line(): Promise<string> {
		for (;;) {
			const end = this.#held.indexOf('\r\n');
			if (end >= 0) {
				const line = this.#held.toString('latin1', 0, end);
				this.#held = this.#held.subarray(end + 2);
				return line;
			}
			if (this.#held.length > LONGEST_LINE) throw new Problem('InvalidRequest', 'A chunk header is too long.');
			if (!(await this.#more())) throw new Problem('IncompleteBody', 'The body ends inside its chunk framing.');
		}
	}

	async *take(count: number): AsyncGenerator<Buffer> {
		let left = count;
		while (left > 0) {
			if (this.#held.length === 0 && !(await this.#more())) {
				throw new Problem('IncompleteBody', 'The body ends inside a chunk.');
			}
			const piece = this.#held.subarray(0, left);
			this.#held = this.#held.subarray(piece.length);
			left -= piece.length;
			if (piece.length > 0) yield piece;
		}
	}

	async assertEnd(): Promise<void> {
		if (this.#held.length > 0 || (await this.#more())) {
			throw new Problem('InvalidRequest', 'There is data after the last chunk.');
		}
	}
}

function parseHeader(line: string, signed: boolean): { size: number; signature: string } {
	const match = signed
		? /^([0-9a-fA-F]{1,8});chunk-signature=([0-9a-f]{64})$/.exec(line)
		: /^([0-9a-fA-F]{1,8})()$/.exec(line);
	if (!match) throw new Problem('InvalidRequest', 'A chunk header is malformed.');
	return { size: parseInt(match[1] ?? '', 16), signature: match[2] ?? '' };
}

/** The chain of signatures: each one covers the one before it, so chunks cannot be swapped or dropped. */
class Chain {
	#from: Verified;
	#previous: string;

	constructor(from: Verified) {
		this.#from = from;
		this.#previous = from.signature;
	}

	assert(kind: 'PAYLOAD' | 'TRAILER', hashes: readonly string[], given: string): void {
		const { date, scope, signingKey } = this.#from;
		const text = [`AWS4-HMAC-SHA256-${kind}`, date, scope, this.#previous, ...hashes].join('\n');
		const expected = hmacHex(signingKey, text);
		if (!sameSignature(expected, given)) {
			throw new Problem('SignatureDoesNotMatch', 'The signature of a chunk does not match.');
		}
		this.#previous = expected;
	}
}

async function readTrailers(reader: Reader): Promise<Map<string, string>> {
	const trailers = new Map<string, string>();
	for (;;) {
		const line = await reader.line();
		if (line === '') return trailers;
		const colon = line.indexOf(':');
		if (colon < 1) throw new Problem('MalformedTrailerError', 'A trailer is not of the form name:value.');
		trailers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim());
	}
}

function assertTrailerSignature(chain: Chain, trailers: Map<string, string>): void {
	const given = trailers.get(TRAILER_SIGNATURE) ?? '';
	trailers.delete(TRAILER_SIGNATURE);
	const text = [...trailers].map(([name, value]) => `${name}:${value}\n`).join('');
	chain.assert('TRAILER', [sha256Hex(text)], given);
}

/**
 * Strips the aws-chunked framing from a body and checks the signatures of its chunks and of its trailer.
 * Yields the content; hands the trailers over once the last chunk has been read.
 */
export async function* unchunk(
	source: AsyncIterable<Uint8Array>,
	framing: Framing,
	onTrailers: (trailers: ReadonlyMap<string, string>) => void
): AsyncGenerator<Buffer> {
	const reader = new Reader(source);
	const chain = framing.signedFrom ? new Chain(framing.signedFrom) : null;
	for (;;) {
		const { size, signature } = parseHeader(await reader.line(), chain !== null);
		const hash = createHash('sha256');
		for await (const piece of reader.take(size)) {
			if (chain) hash.update(piece);
			yield piece;
		}
		chain?.assert('PAYLOAD', [EMPTY_HASH, hash.digest('hex')], signature);
		if (size === 0) break;
		if ((await reader.line()) !== '') throw new Problem('InvalidRequest', 'A chunk is longer than it says.');
	}
	const trailers = await readTrailers(reader);
	if (!framing.trailer && trailers.size > 0) throw new Problem('MalformedTrailerError', 'A trailer was not announced.');
	if (chain && framing.trailer) assertTrailerSignature(chain, trailers);
	onTrailers(trailers);
	await reader.assertEnd();
}
