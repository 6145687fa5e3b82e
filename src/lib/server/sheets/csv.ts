import Papa from 'papaparse';
import { cellOf, RowCollector, UnreadableSheet, type SheetRow } from './types';

const DELIMITERS = [';', '\t', ',', '|'] as const;
const HEAD_BYTES = 64 * 1024;

/** UTF-16 by its mark, UTF-8 where every byte of the beginning is, else the eight-bit set that spreadsheets write. */
function encodingOf(bytes: Uint8Array): string {
	if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
	if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
	try {
		// `stream`: the beginning may end inside a character.
		new TextDecoder('utf-8', { fatal: true }).decode(bytes.subarray(0, HEAD_BYTES), { stream: true });
		return 'utf-8';
	} catch {
		return 'windows-1252';
	}
}

/** What separates the head's names most often; the order above decides between equals. */
function delimiterOf(text: string): string {
	const head = text.split(/\r\n|\n|\r/, HEAD_LINES).find((line) => line.trim() !== '') ?? '';
	const bare = head.replace(/"(?:[^"]|"")*"/g, '');
	const counts = DELIMITERS.map((delimiter) => bare.split(delimiter).length);
	return DELIMITERS[counts.indexOf(Math.max(...counts))] ?? ';';
}
const HEAD_LINES = 100;

/** Reads a delimited text; encoding and delimiter are found by themselves. @throws UnreadableSheet. */
export function readCsv(bytes: Uint8Array): readonly SheetRow[] {
	const text = new TextDecoder(encodingOf(bytes)).decode(bytes);
	const collector = new RowCollector();
	let number = 0;
	Papa.parse<string[]>(text, {
		delimiter: delimiterOf(text),
		step: ({ data }) => {
			number += 1;
			collector.add({ number, cells: data.map((cell) => cellOf(cell)) });
		}
	});
	if (collector.rows.length === 0) throw new UnreadableSheet({ kind: 'empty' });
	return collector.rows;
}
