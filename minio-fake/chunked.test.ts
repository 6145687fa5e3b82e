import { createHmac } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { startChecksum } from './checksums';
import { unchunk, type Framing } from './chunked';
import { Body } from './payload';
import { sha256Hex, type Verified } from './sigv4';

const verified: Verified = {
	payload: 'STREAMING-AWS4-HMAC-SHA256-PAYLOAD-TRAILER',
	signature: sha256Hex('the seed signature'),
	date: '20261201T000000Z',
	scope: '20261201/us-east-1/s3/aws4_request',
	signingKey: Buffer.from('key')
};

function sign(kind: string, previous: string, ...hashes: readonly string[]): string {
	const text = [`AWS4-HMAC-SHA256-${kind}`, verified.date, verified.scope, previous, ...hashes].join('\n');
	return createHmac('sha256', verified.signingKey).update(text).digest('hex');
}

/** A body as a client that signs its chunks writes it. */
function signedBody(chunks: readonly string[], trailer?: string): string {
	let previous = verified.signature;
	const lines = [...chunks, ''].map((chunk) => {
		previous = sign('PAYLOAD', previous, sha256Hex(''), sha256Hex(chunk));
		return `${Buffer.byteLength(chunk).toString(16)};chunk-signature=${previous}\r\n${chunk}${chunk ? '\r\n' : ''}`;
	});
	if (trailer === undefined) return `${lines.join('')}\r\n`;
	const signature = sign('TRAILER', previous, sha256Hex(`${trailer}\n`));
	return `${lines.join('')}${trailer}\r\nx-amz-trailer-signature:${signature}\r\n\r\n`;
}

async function* pieces(text: string, size: number): AsyncGenerator<Uint8Array> {
	const bytes = Buffer.from(text);
	for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
}

async function contentOf(source: AsyncIterable<Uint8Array>): Promise<string> {
	const read: Uint8Array[] = [];
	for await (const piece of source) read.push(Buffer.from(piece));
	return Buffer.concat(read).toString();
}

const signed: Framing = { signedFrom: verified, trailer: false };
const plain: Framing = { signedFrom: null, trailer: true };
const read = (text: string, framing: Framing, size = 7) =>
	contentOf(unchunk(pieces(text, size), framing, () => undefined));

describe('signed chunks', () => {
	const body = signedBody(['borage', 'tansy\r\n', 'woad']);

	test.each([1, 3, 1000])('are read whatever pieces of %i bytes they arrive in', async (size) => {
		expect(await read(body, signed, size)).toBe('boragetansy\r\nwoad');
	});

	test.each([
		['a changed byte', body.replace('borage', 'porage')],
		['two chunks swapped', signedBody(['a', 'b']).replace(/(1;.*\r\na\r\n)(1;.*\r\nb\r\n)/, '$2$1')],
		['a chunk left out', body.replace(/6;chunk-signature=.*\r\nborage\r\n/, '')]
	])('%s is refused', async (_what, tampered) => {
		await expect(read(tampered, signed)).rejects.toMatchObject({ code: 'SignatureDoesNotMatch' });
	});

	test.each([20, 100, 260])('a body cut after %i bytes is incomplete', async (length) => {
		await expect(read(body.slice(0, length), signed)).rejects.toMatchObject({ code: 'IncompleteBody' });
	});

	test('a signature is not optional', async () => {
		await expect(read('1\r\na\r\n0\r\n\r\n', signed)).rejects.toMatchObject({ code: 'InvalidRequest' });
	});
});

describe('chunks without signatures', () => {
	test('are read', async () => expect(await read('3\r\nabc\r\n2\r\nde\r\n0\r\n\r\n', plain)).toBe('abcde'));

	test.each([
		['a chunk longer than it says', '1\r\nabc\r\n0\r\n\r\n', 'InvalidRequest'],
		['a size that is no number', 'x\r\nabc\r\n0\r\n\r\n', 'InvalidRequest'],
		['something after the end', '0\r\n\r\nmore', 'InvalidRequest'],
		['no last chunk', '3\r\nabc\r\n', 'IncompleteBody'],
		['a trailer that is none', '0\r\nnonsense\r\n\r\n', 'MalformedTrailerError']
	])('%s is refused', async (_what, text, code) => {
		await expect(read(text, plain)).rejects.toMatchObject({ code });
	});
});

describe('trailers', () => {
	const crc = startChecksum('crc32c');
	crc.update(Buffer.from('woad'));
	const right = `x-amz-checksum-crc32c:${crc.digest()}`;
	const body = (text: string, announced: string, payload = verified.payload) => {
		const headers = new Map([
			['x-amz-trailer', announced],
			['x-amz-decoded-content-length', '4']
		]);
		return contentOf(new Body(pieces(text, 11), headers, [], { ...verified, payload }));
	};

	test('a signed one with the right checksum is taken', async () => {
		expect(await body(signedBody(['woad'], right), 'x-amz-checksum-crc32c')).toBe('woad');
	});

	test('a signed one that was changed is refused', async () => {
		const changed = signedBody(['woad'], right).replace(right, 'x-amz-checksum-crc32c:AAAAAA==');
		await expect(body(changed, 'x-amz-checksum-crc32c')).rejects.toMatchObject({ code: 'SignatureDoesNotMatch' });
	});

	const unsigned = 'STREAMING-UNSIGNED-PAYLOAD-TRAILER';
	test.each([
		['a wrong checksum', '4\r\nwoad\r\n0\r\nx-amz-checksum-crc32c:AAAAAA==\r\n\r\n', 'BadDigest'],
		['a missing trailer', '4\r\nwoad\r\n0\r\n\r\n', 'MalformedTrailerError'],
		['another trailer', `4\r\nwoad\r\n0\r\n${right}\r\nx-other:1\r\n\r\n`, 'MalformedTrailerError'],
		['another length than stated', `3\r\nwoa\r\n0\r\n${right}\r\n\r\n`, 'IncompleteBody']
	])('%s is refused', async (_what, text, code) => {
		await expect(body(text, 'x-amz-checksum-crc32c', unsigned)).rejects.toMatchObject({ code });
	});
});
