const MIB = 1024 * 1024;

/** The largest file that is taken, in bytes. */
export const FILE_LIMIT = 250 * MIB;

export type FileFault = 'tooLarge' | 'empty';

/** Judged by name and size alone, before the first byte is sent. */
export function fileFault(bytes: number, limit = FILE_LIMIT): FileFault | null {
	if (bytes === 0) return 'empty';
	return bytes > limit ? 'tooLarge' : null;
}

export interface FilePart {
	/** From 1, as the bucket counts. */
	readonly number: number;
	readonly from: number;
	readonly to: number;
}

/** The parts of a file, each of `partBytes` but the last. */
export function partsOf(bytes: number, partBytes: number): FilePart[] {
	const count = Math.max(1, Math.ceil(bytes / partBytes));
	return Array.from({ length: count }, (_, index) => ({
		number: index + 1,
		from: index * partBytes,
		to: Math.min(bytes, (index + 1) * partBytes)
	}));
}
