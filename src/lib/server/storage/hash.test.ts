import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { digest, HEAD_BYTES } from './hash';

test('one reading gives hash, length and beginning', async () => {
	const content = Buffer.alloc(HEAD_BYTES * 2 + 5, 'borage');
	async function* pieces() {
		for (let at = 0; at < content.length; at += 300_001) yield content.subarray(at, at + 300_001);
	}
	const { sha256, bytes, head } = await digest(pieces());
	expect(sha256).toBe(createHash('sha256').update(content).digest('hex'));
	expect(bytes).toBe(content.length);
	expect(Buffer.compare(head, content.subarray(0, HEAD_BYTES))).toBe(0);
});
