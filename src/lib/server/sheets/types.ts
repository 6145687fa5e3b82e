/** The most rows with content, without the head, that one import takes. */
export const MOST_SHEET_ROWS = 20_000;
export const MOST_SHEET_COLUMNS = 100;
/** The longest text of one cell, in characters. */
export const LONGEST_CELL = 2_000;
/** The largest file read as a sheet, in bytes (25 MiB). */
export const SHEET_LIMIT_BYTES = 25 * 1024 * 1024;

/** Why a cell cannot be trusted: an error such as #REF!, a formula nobody has computed, a figure that became a date. */
export type CellFault = 'errorValue' | 'notComputed' | 'becameDate' | 'tooLong';

/** A cell as text; figures in full with "." as the sign. Of a faulty one, what the sheet shows of it. */
export interface SheetCell {
	readonly text: string;
	readonly fault: CellFault | null;
}

/** A row that holds anything. `number` is the one that the program shows beside it, counted from 1. */
export interface SheetRow {
	readonly number: number;
	readonly cells: readonly (SheetCell | undefined)[];
}

export type SheetProblem =
	| { readonly kind: 'notASheet' }
	| { readonly kind: 'empty' }
	| { readonly kind: 'encrypted' }
	| { readonly kind: 'tooLarge'; readonly limit: number }
	| { readonly kind: 'unpacksTooLarge'; readonly limit: number }
	| { readonly kind: 'tooManyRows'; readonly limit: number }
	| { readonly kind: 'tooManyColumns'; readonly limit: number };

/** The file as a whole cannot be read; nothing of it is used. */
export class UnreadableSheet extends Error {
	constructor(readonly problem: SheetProblem) {
		super(problem.kind);
		this.name = 'UnreadableSheet';
	}
}

const EMPTY = /^[\s\u00a0]*$/;

export function cellOf(text: string, fault: CellFault | null = null): SheetCell | undefined {
	const trimmed = text.replaceAll('\u00a0', ' ').trim();
	if (trimmed === '' && fault === null) return undefined;
	return trimmed.length > LONGEST_CELL
		? { text: trimmed.slice(0, LONGEST_CELL), fault: 'tooLong' }
		: { text: trimmed, fault };
}

export const hasContent = (row: SheetRow): boolean => row.cells.some((cell) => cell && !EMPTY.test(cell.text));

/** Keeps what holds something and stops where the limits do. The head counts as one row more. */
export class RowCollector {
	readonly rows: SheetRow[] = [];

	add(row: SheetRow): void {
		if (row.cells.length > MOST_SHEET_COLUMNS) {
			throw new UnreadableSheet({ kind: 'tooManyColumns', limit: MOST_SHEET_COLUMNS });
		}
		if (!hasContent(row)) return;
		if (this.rows.length > MOST_SHEET_ROWS) {
			throw new UnreadableSheet({ kind: 'tooManyRows', limit: MOST_SHEET_ROWS });
		}
		this.rows.push(row);
	}
}
