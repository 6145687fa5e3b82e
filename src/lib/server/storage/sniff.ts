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

/** Control codes that no text holds; tabs, line ends and form feeds are text. */
const isControl = (code: number): boolean => code < 0x20 && ![0x09, 0x0a, 0x0c, 0x0d].includes(code);

/** UTF-16 that begins with its mark, or null. */
function utf16Of(head: Uint8Array): string | null {
	const [first, second] = head;
	const encoding =
		first === 0xff && second === 0xfe ? 'utf-16le' : first === 0xfe && second === 0xff ? 'utf-16be' : null;
	if (encoding === null) return null;
	const text = new TextDecoder(encoding).decode(head, { stream: true });
	return [...text].some((char) => isControl(char.charCodeAt(0)) || char === '\ufffd') ? null : text;
}

/** UTF-8, or eight bits a character without control codes, or null. */
function eightBitOf(head: Uint8Array): string | null {
	if (head.some(isControl)) return null;
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
	// First, because the mark of UTF-16 is also how some sound files begin.
	const utf16 = utf16Of(head);
	if (utf16 !== null) return sniffText(utf16, fileName);
	const found = await fileTypeFromBuffer(head);
	if (!found) {
		const text = eightBitOf(head);
		return text === null ? { taken: false, found: 'application/octet-stream' } : sniffText(text, fileName);
	}
	const kind = found.mime === 'application/zip' ? kindInArchive(head) : kindOfMediaType(found.mime);
	return kind === null
		? { taken: false, found: found.mime }
		: { taken: true, kind, renamed: !nameFits(fileName, kind) };
}
