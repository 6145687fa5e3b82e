import { FILE_KIND_NAMES } from './kinds';

/** The largest file taken, in bytes (250 MiB). */
export const UPLOAD_LIMIT_BYTES = 250 * 1024 * 1024;

/** What travels in one request, in bytes (8 MiB); every part but the last has exactly this size. */
export const PART_BYTES = 8 * 1024 * 1024;

/** The longest name kept, in characters; the column allows no more. */
export const NAME_LIMIT = 255;

export type UploadRefusal =
	| { readonly code: 'file-too-large'; readonly data: { name: string; bytes: number; limit: number } }
	| { readonly code: 'file-empty'; readonly data: { name: string; bytes: 0 } }
	| { readonly code: 'kind-not-taken'; readonly data: { name: string; found: string; taken: readonly string[] } };

/** Judges a file by what is said of it, before its first byte travels; null when it may begin. */
export function judgeAnnounced(name: string, bytes: number): UploadRefusal | null {
	if (bytes > UPLOAD_LIMIT_BYTES) return { code: 'file-too-large', data: { name, bytes, limit: UPLOAD_LIMIT_BYTES } };
	if (bytes <= 0) return { code: 'file-empty', data: { name, bytes: 0 } };
	return null;
}

/** The refusal of a file whose content is of no kind we keep. `found` is what it was recognised as. */
export const kindNotTaken = (name: string, found: string): UploadRefusal => ({
	code: 'kind-not-taken',
	data: { name, found, taken: FILE_KIND_NAMES }
});

/** How many parts a file of so many bytes has; at least one. */
export const partCount = (bytes: number): number => Math.max(1, Math.ceil(bytes / PART_BYTES));

/** The exact size of part `number` (counted from 1) of a file of so many bytes; null when it has no such part. */
export function partBytes(bytes: number, number: number): number | null {
	if (!Number.isInteger(number) || number < 1 || number > partCount(bytes)) return null;
	return Math.min(PART_BYTES, bytes - (number - 1) * PART_BYTES);
}

// Control and format characters, surrogates without a partner: nothing that could turn or hide a part of a name.
const UNPRINTABLE = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu;

/**
 * A name as it may be shown and sent back: no folder before it, no unprintable or reserved characters,
 * no longer than NAME_LIMIT (its ending survives). Never empty.
 */
export function cleanFileName(name: string): string {
	const last = name.normalize('NFC').split(/[\\/]/).at(-1) ?? '';
	const plain = last
		.replace(UNPRINTABLE, '')
		.replace(/[<>:"|?*]/g, '_')
		.replace(/\s+/g, ' ')
		.replace(/^[. ]+|[. ]+$/g, '');
	if (plain === '') return 'file';
	if (plain.length <= NAME_LIMIT) return plain;
	const ending = /\.[A-Za-z0-9]{1,8}$/.exec(plain)?.[0] ?? '';
	return `${[...plain.slice(0, NAME_LIMIT - ending.length - 1)].join('').replace(UNPRINTABLE, '')}${ending}`;
}
