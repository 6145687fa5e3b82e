import type { Content, TableCell } from 'pdfmake/interfaces';
import {
	MARGIN,
	ROWS,
	TABLE,
	cell,
	factsTable,
	fitsRows,
	headCell,
	note,
	numbered,
	subheading,
	titledBlock,
	weightOf,
	widthBetween
} from './paper';
import type { BlockPrint, TableColumnPrint } from './types';

const CELL_PADDING = 9;
const FACT_LABEL = 136;

/** One block of a section. Tables repeat their head on each page and keep a row together while it is short. */
export function blockContent(block: BlockPrint): Content {
	switch (block.kind) {
		case 'text':
			return { text: block.text, margin: [0, 5, 0, 0] };
		case 'note':
			return note(block.text, [0, 5, 0, 0]);
		case 'subheading':
			return subheading(block.text);
		case 'steps':
			return { ...numberedBlock(block.steps), margin: [0, 5, 0, 0] };
		case 'facts':
			return {
				stack: [
					factsTable(
						block.rows.map((row) => [row.label, cell(row.value)]),
						FACT_LABEL
					)
				],
				fontSize: TABLE,
				margin: [0, 7, 0, 0]
			};
		case 'table':
			return dataTable(block);
	}
}

const numberedBlock = (steps: readonly string[]) => ({ stack: [numbered(steps)] });

function widthsOf(columns: readonly TableColumnPrint[]): number[] {
	const room = widthBetween(MARGIN) - CELL_PADDING * (columns.length - 1);
	const total = columns.reduce((sum, column) => sum + column.weight, 0);
	return columns.map((column) => (room * column.weight) / total);
}

function dataTable(block: Extract<BlockPrint, { kind: 'table' }>): Content {
	if (block.columns.length === 0) return { text: '' };
	const whole = fitsRows(block.rows.flat());
	const table: Content = {
		fontSize: TABLE,
		margin: [0, block.title === null ? 7 : 0, 0, 0],
		table: {
			widths: widthsOf(block.columns),
			headerRows: 1,
			keepWithHeaderRows: whole && block.rows.length > 0 ? 1 : 0,
			dontBreakRows: whole,
			body: [
				block.columns.map((column) => headCell(column.head, column.kind === 'number' ? 'right' : 'left') as TableCell),
				// A row that is shorter than the head is filled up: pdfmake refuses ragged tables.
				...block.rows.map((row) => block.columns.map((column, index) => dataCell(column, row[index] ?? '')))
			]
		},
		layout: ROWS
	};
	if (block.title === null) return table;
	return titledBlock(block.title, table, tableWeight(block), TABLE);
}

const tableWeight = (block: Extract<BlockPrint, { kind: 'table' }>) =>
	block.rows.reduce((sum, row) => sum + Math.max(80, weightOf(...row) * 1.5), 0);

function dataCell(column: TableColumnPrint, text: string): TableCell {
	if (column.kind === 'number') return { text, alignment: 'right' };
	return column.kind === 'code' ? { text, font: 'Mono', fontSize: 7 } : { text };
}
