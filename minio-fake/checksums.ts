import { createHash } from 'node:crypto';
import { crc32 } from 'node:zlib';

export interface Checksum {
	update(chunk: Uint8Array): void;
	/** Base64, as the x-amz-checksum-* headers carry it. */
	digest(): string;
}

const bigEndian = (...words: readonly number[]): string => {
	const bytes = Buffer.alloc(words.length * 4);
	words.forEach((word, index) => bytes.writeUInt32BE(word >>> 0, index * 4));
	return bytes.toString('base64');
};

function hashed(algorithm: 'sha1' | 'sha256'): Checksum {
	const hash = createHash(algorithm);
	return { update: (chunk) => void hash.update(chunk), digest: () => hash.digest('base64') };
}

function crc32Checksum(): Checksum {
	let value = 0;
	return {
		update(chunk) {
			// An empty chunk must change nothing, but zlib answers 0 for it and forgets what came before.
			if (chunk.length > 0) value = crc32(chunk, value);
		},
		digest: () => bigEndian(value)
	};
}

const CRC32C_TABLE = Uint32Array.from({ length: 256 }, (_, index) => {
	let value = index;
	for (let bit = 0; bit < 8; bit++) value = value & 1 ? (value >>> 1) ^ 0x82f63b78 : value >>> 1;
	return value;
});

function crc32cChecksum(): Checksum {
	let value = 0xffffffff;
	return {
		update(chunk) {
			for (const byte of chunk) value = (CRC32C_TABLE[(value ^ byte) & 0xff] ?? 0) ^ (value >>> 8);
		},
		digest: () => bigEndian(~value)
	};
}

const CRC64_POLYNOMIAL = 0x9a6c9329ac4bc9b5n;
const CRC64_TABLE = Array.from({ length: 256 }, (_, index) => {
	let value = BigInt(index);
	for (let bit = 0; bit < 8; bit++) value = value & 1n ? (value >> 1n) ^ CRC64_POLYNOMIAL : value >> 1n;
	return value;
});
// In halves of 32 bits: bigint arithmetic per byte would take seconds for a large file.
const CRC64_HIGH = Uint32Array.from(CRC64_TABLE, (value) => Number(value >> 32n));
const CRC64_LOW = Uint32Array.from(CRC64_TABLE, (value) => Number(value & 0xffffffffn));

function crc64nvmeChecksum(): Checksum {
	let high = 0xffffffff;
	let low = 0xffffffff;
	return {
		update(chunk) {
			for (const byte of chunk) {
				const index = (low ^ byte) & 0xff;
				low = (((high & 0xff) << 24) | (low >>> 8)) ^ (CRC64_LOW[index] ?? 0);
				high = (high >>> 8) ^ (CRC64_HIGH[index] ?? 0);
			}
		},
		digest: () => bigEndian(~high, ~low)
	};
}

const MAKERS = {
	crc32: crc32Checksum,
	crc32c: crc32cChecksum,
	crc64nvme: crc64nvmeChecksum,
	sha1: () => hashed('sha1'),
	sha256: () => hashed('sha256')
} as const;

export type ChecksumName = keyof typeof MAKERS;

export const CHECKSUM_NAMES = Object.keys(MAKERS) as readonly ChecksumName[];

export const checksumHeader = (name: ChecksumName): string => `x-amz-checksum-${name}`;

/** The checksum a header or trailer name asks for, or null when it asks for none we know. */
export const checksumOfHeader = (header: string): ChecksumName | null =>
	CHECKSUM_NAMES.find((name) => checksumHeader(name) === header) ?? null;

export const startChecksum = (name: ChecksumName): Checksum => MAKERS[name]();
