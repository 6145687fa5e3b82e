import { fileTypeFromBuffer } from 'file-type';
import { extensionOf, kindOfMediaType, nameFits, type FileKind } from './kinds';

/** What a file is, by its content. `renamed`: its name promises another kind. */
export type Sniffed =
	| { readonly taken: true; readonly kind: FileKind; readonly renamed: boolean }
	| { readonly taken: false; readonly found: string };

const OPENING_MARKUP = /^\s*<(?:!doctype|\?xml|html|head|body|script|svg|!--)/i;
const LINES_LOOKED_AT = 20;
const SEPARATORS = [';', ',', '\t'] as const;

/** Office files are ZIP archives; where their first entries do not tell, the names inside do. */
const OFFICE_ENTRIES: readonly (readonly [entry: string, kind: FileKind])[] = [
	['word/document.xml', 'docx'],
	['xl/workbook.xml', 'xlsx']
];

function kindInArchive(head: Uint8Array): FileKind | null {
	const bytes = Buffer.from(head.buffer, head.byteOffset, head.byteLength);
	return OFFICE_ENTRIES.find(([entry]) => bytes.includes(entry))?.[1] ?? null;
}

/** The beginning as text, or null when it is none: UTF-8, UTF-16 with its mark, or eight-bit without control codes. */
function textOf(head: Uint8Array): string | null {
	const mark =
		head[0] === 0xff && head[1] === 0xfe ? 'utf-16le' : head[0] === 0xfe && head[1] === 0xff ? 'utf-16be' : null;
	if (mark !== null) return new TextDecoder(mark).decode(head);
	const hasControl = head.some(
		(byte) => byte < 0x20 && byte !== 0x09 && byte !== 0x0a && byte !== 0x0d && byte !== 0x0c
	);
	if (hasControl) return null;
	try {
		// `stream`: the head may end inside a character.
		return new TextDecoder('utf-8', { fatal: true }).decode(head, { stream: true });
	} catch {
		return new TextDecoder('windows-1252').decode(head);
	}
}

const countOutsideQuotes = (line: string, separator: string): number =>
	line.replace(/"(?:[^"]|"")*"/g, '').split(separator).length - 1;

/** At least two lines, each with the same number of one separator. */
function looksLikeTable(text: string): boolean {
	const lines = text.split(/\r\n|\n|\r/).slice(0, LINES_LOOKED_AT);
	const whole = lines.slice(0, lines.length < LINES_LOOKED_AT ? lines.length : -1).filter((line) => line.trim() !== '');
	if (whole.length < 2) return false;
	return SEPARATORS.some((separator) => {
		const [first = 0, ...others] = whole.map((line) => countOutsideQuotes(line, separator));
		return first > 0 && others.every((count) => count === first);
	});
}

function sniffText(text: string, fileName: string): Sniffed {
	if (OPENING_MARKUP.test(text)) return { taken: false, found: 'text/html' };
	const extension = extensionOf(fileName);
	// A table of one column is also plain text: between these two, and only here, the name decides.
	const kind =
		extension === 'csv' || extension === 'tsv' || (extension !== 'txt' && looksLikeTable(text)) ? 'csv' : 'text';
	return { taken: true, kind, renamed: !nameFits(fileName, kind) };
}

/** Recognises a file by the beginning of its content (see HEAD_BYTES); the name is only compared with the result. */
export async function sniff(head: Uint8Array, fileName: string): Promise<Sniffed> {
	const found = await fileTypeFromBuffer(head);
	if (!found) {
		const text = textOf(head);
		return text === null ? { taken: false, found: 'application/octet-stream' } : sniffText(text, fileName);
	}
	const kind = found.mime === 'application/zip' ? kindInArchive(head) : kindOfMediaType(found.mime);
	return kind === null
		? { taken: false, found: found.mime }
		: { taken: true, kind, renamed: !nameFits(fileName, kind) };
}
