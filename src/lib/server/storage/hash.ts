import { createHash } from 'node:crypto';

export interface Digest {
	readonly sha256: string;
	readonly bytes: number;
	/** The beginning of the content, for recognising its kind. */
	readonly head: Uint8Array;
}

/** Enough for a ZIP-based office file to reach the entry that tells its kind. */
export const HEAD_BYTES = 1024 * 1024;

/** Reads content once: hash, length and its first HEAD_BYTES. */
export async function digest(content: AsyncIterable<Uint8Array>): Promise<Digest> {
	const hash = createHash('sha256');
	const head: Uint8Array[] = [];
	let bytes = 0;
	for await (const piece of content) {
		hash.update(piece);
		if (bytes < HEAD_BYTES) head.push(piece.subarray(0, HEAD_BYTES - bytes));
		bytes += piece.length;
	}
	return { sha256: hash.digest('hex'), bytes, head: Buffer.concat(head) };
}
