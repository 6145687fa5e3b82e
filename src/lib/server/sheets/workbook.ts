import { formatOf, plainFigure, type FigureFormat } from './figures';
import { OfficePackage } from './package';
import { cellOf, MOST_SHEET_COLUMNS, RowCollector, UnreadableSheet, type SheetCell, type SheetRow } from './types';

/** All texts that cells share may be this long together, in characters (64 million). */
const SHARED_LIMIT = 64 * 1024 * 1024;
/** More merged ranges than this are no table. */
const MOST_MERGES = 20_000;
const MOST_MERGED_CELLS = 2_000_000;

interface Merge {
	readonly fromRow: number;
	readonly toRow: number;
	readonly fromColumn: number;
	readonly toColumn: number;
}

/** "BC12" → column 54, row 12; columns count from 0. Null where the reference is none. */
function placeOf(reference: string): { readonly column: number; readonly row: number } | null {
	const match = /^\$?([A-Z]{1,3})\$?(\d{1,7})$/.exec(reference);
	if (!match) return null;
	const column = [...(match[1] ?? '')].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1;
	return { column, row: Number(match[2]) };
}

function mergeOf(range: string): Merge | null {
	const [from, to] = range.split(':').map(placeOf);
	return from && to ? { fromRow: from.row, toRow: to.row, fromColumn: from.column, toColumn: to.column } : null;
}

/** The part that holds the first sheet of the workbook, hidden ones left aside. @throws UnreadableSheet. */
async function firstSheet(file: OfficePackage): Promise<string> {
	let relation: string | null = null;
	await file.read('xl/workbook.xml', {
		open: (name, attributes) => {
			if (name !== 'sheet' || relation !== null || (attributes['state'] ?? 'visible') !== 'visible') return;
			relation = attributes['r:id'] ?? null;
		}
	});
	let target: string | null = null;
	await file.read('xl/_rels/workbook.xml.rels', {
		open: (name, attributes) => {
			if (name === 'Relationship' && attributes['Id'] === relation) target = attributes['Target'] ?? null;
		}
	});
	const path = partPath(target ?? '');
	if (!file.has(path)) throw new UnreadableSheet({ kind: 'notASheet' });
	return path;
}

const partPath = (target: string) => (target.startsWith('/') ? target.slice(1) : `xl/${target}`);

/** The texts that cells refer to by number. Phonetic hints beside a text are not part of it. */
async function sharedTexts(file: OfficePackage): Promise<readonly string[]> {
	const texts: string[] = [];
	let current = '';
	let length = 0;
	let inText = false;
	let inHint = false;
	await file.read('xl/sharedStrings.xml', {
		open: (name) => {
			if (name === 'si') current = '';
			if (name === 'rPh') inHint = true;
			inText = name === 't' && !inHint;
		},
		text: (text) => {
			if (!inText) return;
			length += text.length;
			if (length > SHARED_LIMIT) throw new UnreadableSheet({ kind: 'unpacksTooLarge', limit: SHARED_LIMIT });
			current += text;
		},
		close: (name) => {
			if (name === 't') inText = false;
			if (name === 'rPh') inHint = false;
			if (name === 'si') texts.push(current);
		}
	});
	return texts;
}

/** How each cell style shows a figure. */
async function figureFormats(file: OfficePackage): Promise<readonly FigureFormat[]> {
	const codes = new Map<number, string>();
	const formats: FigureFormat[] = [];
	let inStyles = false;
	await file.read('xl/styles.xml', {
		open: (name, attributes) => {
			const id = Number(attributes['numFmtId'] ?? 0);
			if (name === 'numFmt') codes.set(id, attributes['formatCode'] ?? '');
			if (name === 'cellXfs') inStyles = true;
			if (name === 'xf' && inStyles) formats.push(formatOf(id, codes.get(id)));
		},
		close: (name) => {
			if (name === 'cellXfs') inStyles = false;
		}
	});
	return formats;
}

interface RawCell {
	readonly column: number;
	readonly type: string;
	readonly style: number;
	formula: boolean;
	value: string | null;
	inline: string;
}

class SheetReader {
	readonly collector = new RowCollector();
	readonly merges: Merge[] = [];
	#row = 0;
	#cells: (SheetCell | undefined)[] = [];
	#cell: RawCell | null = null;
	#hears: 'value' | 'inline' | null = null;
	#hint = false;

	constructor(
		readonly texts: readonly string[],
		readonly formats: readonly FigureFormat[]
	) {}

	open(name: string, attributes: Readonly<Record<string, string>>): void {
		if (name === 'row') {
			this.#row = Number(attributes['r'] ?? this.#row + 1);
			this.#cells = [];
		} else if (name === 'c') this.#begin(attributes);
		else if (name === 'f' && this.#cell) this.#cell.formula = true;
		else if (name === 'v') this.#hears = 'value';
		else if (name === 'rPh') this.#hint = true;
		else if (name === 't' && !this.#hint) this.#hears = 'inline';
		else if (name === 'mergeCell') this.#merge(attributes['ref'] ?? '');
	}

	text(text: string): void {
		if (!this.#cell) return;
		if (this.#hears === 'value') this.#cell.value = (this.#cell.value ?? '') + text;
		if (this.#hears === 'inline') this.#cell.inline += text;
	}

	close(name: string): void {
		if (name === 'v' || name === 't') this.#hears = null;
		else if (name === 'rPh') this.#hint = false;
		else if (name === 'c' && this.#cell) {
			this.#cells[this.#cell.column] = this.#read(this.#cell);
			this.#cell = null;
		} else if (name === 'row') this.collector.add({ number: this.#row, cells: this.#cells });
	}

	#begin(attributes: Readonly<Record<string, string>>): void {
		const column = placeOf(attributes['r'] ?? '')?.column ?? this.#cells.length;
		if (column >= MOST_SHEET_COLUMNS) {
			// Far to the right stand notes, not the table.
			this.#cell = null;
			return;
		}
		const style = Number(attributes['s'] ?? 0);
		this.#cell = { column, type: attributes['t'] ?? 'n', style, formula: false, value: null, inline: '' };
	}

	#merge(range: string): void {
		const merge = mergeOf(range);
		if (merge && this.merges.length < MOST_MERGES) this.merges.push(merge);
	}

	#read({ type, style, formula, value, inline }: RawCell): SheetCell | undefined {
		if (type === 'inlineStr') return cellOf(inline);
		if (value === null) return formula ? cellOf('', 'notComputed') : undefined;
		if (type === 's') return cellOf(this.texts[Number(value)] ?? '');
		if (type === 'e') return cellOf(value, 'errorValue');
		if (type === 'b') return cellOf(value === '1' ? 'true' : 'false');
		if (type === 'd') return cellOf(value, 'becameDate');
		if (type === 'str') return cellOf(value);
		const format = this.formats[style] ?? 'plain';
		if (format === 'date') return cellOf(plainFigure(value), 'becameDate');
		return cellOf(plainFigure(value, format === 'percent' ? 2 : 0));
	}
}

/** A merged range shows its first cell's content for all: each of its cells gets it. */
function spread(rows: readonly SheetRow[], merges: readonly Merge[]): readonly SheetRow[] {
	const last = rows.at(-1)?.number ?? 0;
	const cellsOf = new Map(rows.map((row) => [row.number, [...row.cells]]));
	let filled = 0;
	for (const merge of merges) {
		const content = cellsOf.get(merge.fromRow)?.[merge.fromColumn];
		if (!content) continue;
		for (let number = merge.fromRow; number <= Math.min(merge.toRow, last); number += 1) {
			// Ranges of a true workbook never overlap; a made one must not keep the worker busy.
			if (filled > MOST_MERGED_CELLS) throw new UnreadableSheet({ kind: 'notASheet' });
			const cells = cellsOf.get(number) ?? [];
			for (let column = merge.fromColumn; column <= Math.min(merge.toColumn, MOST_SHEET_COLUMNS - 1); column += 1) {
				cells[column] ??= content;
				filled += 1;
			}
		}
	}
	return rows.map((row) => ({ number: row.number, cells: cellsOf.get(row.number) ?? row.cells }));
}

/**
 * Reads the first visible sheet of an Office Open XML workbook (ECMA-376): formulas by the value last computed, shares by
 * what their cell shows ("5 %" is 5), merged ranges filled. @throws UnreadableSheet.
 */
export async function readWorkbook(bytes: Buffer): Promise<readonly SheetRow[]> {
	const file = await OfficePackage.open(bytes);
	try {
		const path = await firstSheet(file);
		const reader = new SheetReader(await sharedTexts(file), await figureFormats(file));
		await file.read(path, {
			open: (name, attributes) => reader.open(name, attributes),
			text: (text) => reader.text(text),
			close: (name) => reader.close(name)
		});
		if (reader.collector.rows.length === 0) throw new UnreadableSheet({ kind: 'empty' });
		return spread(reader.collector.rows, reader.merges);
	} finally {
		file.close();
	}
}
