import { describe, expect, test } from 'vitest';
import { startChecksum, type ChecksumName } from './checksums';

const hexOf = (name: ChecksumName, pieces: readonly string[]): string => {
	const running = startChecksum(name);
	for (const piece of pieces) running.update(Buffer.from(piece));
	return Buffer.from(running.digest(), 'base64').toString('hex');
};

// The check values that the catalogues of these algorithms give for the nine digits.
describe.each([
	['crc32', 'cbf43926'],
	['crc32c', 'e3069283'],
	['crc64nvme', 'ae8b14860a799888'],
	['sha1', 'f7c3bc1d808e04732adf679965ccc34ca7ae3441'],
	['sha256', '15e2b0d3c33891ebb0f1ef609ec419420c20e320ce94c65fbc8c3312448eb225']
] as const)('%s', (name, check) => {
	test('has its check value', () => expect(hexOf(name, ['123456789'])).toBe(check));
	test('does not depend on how the content is cut', () => expect(hexOf(name, ['1', '', '2345', '6789'])).toBe(check));
});
