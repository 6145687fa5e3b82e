import writeXlsxFile from 'write-excel-file/node';
import { IMPORT_COLUMNS, type ImportCells } from '$lib/schemas/material-import';

/** Three invented materials that show what a sheet can say: one figure, ranges, a bound, a part of a part, an impurity. */
const EXAMPLES: readonly ImportCells[] = [
	{
		material_code: 'EX-GLY',
		trade_name: 'Example glycerin',
		supplier: 'Example supplier',
		constituent: 'Glycerin',
		cas: '56-81-5',
		ec: '200-289-5',
		typical: '99.5',
		origin: 'plant'
	},
	{ constituent: 'Aqua', cas: '7732-18-5', typical: '0.5' },
	{
		material_code: 'EX-PRF',
		trade_name: 'Example perfume in solubiliser',
		supplier: 'Example supplier',
		constituent: 'PEG-40 Hydrogenated Castor Oil',
		cas: '61788-85-0',
		min: '65',
		max: '82'
	},
	{ constituent: 'Parfum', min: '18', max: '22' },
	{ constituent: 'Linalool', cas: '78-70-6', min: '0.6', max: '2', role: 'of which', part_of: 'Parfum' },
	{ constituent: '1,4-Dioxane', cas: '123-91-1', max: '< 0.001', role: 'impurity' },
	{
		material_code: 'EX-PRS',
		trade_name: 'Example preservative',
		supplier: 'Example supplier',
		constituent: 'Phenoxyethanol',
		cas: '122-99-6',
		typical: '100',
		function: 'preservative',
		nano: 'no'
	}
];

/** The head and the examples, cell by cell. */
export const templateRows = (): readonly (readonly string[])[] => [
	IMPORT_COLUMNS,
	...EXAMPLES.map((cells) => IMPORT_COLUMNS.map((column) => cells[column] ?? ''))
];

const WIDTHS: Partial<Record<(typeof IMPORT_COLUMNS)[number], number>> = {
	trade_name: 28,
	supplier: 20,
	constituent: 32,
	document: 32
};
const USUAL_WIDTH = 14;

/** The same as a workbook. Every cell is text, so that no program turns a CAS number into a day. */
export async function templateWorkbook(): Promise<Uint8Array<ArrayBuffer>> {
	const [head = [], ...rows] = templateRows();
	const cell = (value: string) => (value === '' ? null : { value, type: String, format: '@' });
	const bytes = await writeXlsxFile(
		[head.map((value) => ({ value, type: String, fontWeight: 'bold' as const })), ...rows.map((row) => row.map(cell))],
		{ columns: IMPORT_COLUMNS.map((column) => ({ width: WIDTHS[column] ?? USUAL_WIDTH })), stickyRowsCount: 1 }
	).toBuffer();
	return new Uint8Array(bytes);
}
