import type { Column, Content, TableCell } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { fitsRows, INK, ROWS, RULE, SOFT, headCell, lead, note } from './paper';
import { letterOf } from './words';
import type { CompositionPrint, CompositionRowPrint, SourcePrint } from './types';

const SIZE = 7.8;
const WIDTHS = [12, '*', 46, 57, 34, 56, 27];
const SOURCES_WIDTH = 114;
const SOURCE_SIZE = 7.2;
/** The narrowest columns hold about ten characters a line. */
const NARROW_LIMIT = 300;

/** The composition with its sources in a margin: a letter in the last column leads to the document at the side. */
export function compositionTable(composition: CompositionPrint | null, t: Phrases): Content {
	if (composition === null) return { text: t.file.noComposition, margin: [0, 6, 0, 0] };
	return {
		stack: [
			lead(composition.lead, [0, 10, 0, 8]),
			{ columns: [mainTable(composition, t), sourcesMargin(composition.sources, t)], columnGap: 14 },
			note([t.file.composition.note, ...composition.notes].join(' '))
		]
	};
}

function mainTable(composition: CompositionPrint, t: Phrases): Column {
	const head = t.file.composition;
	const last = composition.rows.length + 1;
	return {
		width: '*',
		fontSize: SIZE,
		table: {
			widths: WIDTHS,
			headerRows: 1,
			keepWithHeaderRows: 1,
			dontBreakRows: fitsRows(
				composition.rows.flatMap((row) => [row.name, row.cas, row.function]),
				NARROW_LIMIT
			),
			body: [
				[
					headCell(head.number, 'right'),
					headCell(head.ingredient),
					headCell(head.cas),
					headCell(head.function),
					headCell(head.share, 'right'),
					headCell(head.range, 'right'),
					headCell(head.from)
				] as TableCell[],
				...composition.rows.map(compositionRow),
				sumRow(head.sum, composition.sum)
			]
		},
		layout: {
			...ROWS,
			hLineWidth: (index) => (index === 0 || index > last ? 0 : index === 1 || index === last ? 0.75 : 0.5),
			hLineColor: (index) => (index === 1 || index === last ? INK : RULE),
			paddingLeft: (index) => (index === 0 ? 0 : 3),
			paddingRight: (index) => (index === WIDTHS.length - 1 ? 0 : 3),
			paddingTop: () => 1.9,
			paddingBottom: () => 1.9
		}
	};
}

function compositionRow(row: CompositionRowPrint): TableCell[] {
	const inside = row.number === null;
	const tone = inside ? { color: SOFT, fontSize: SIZE - 0.6 } : {};
	const code = {
		font: 'Mono',
		fontSize: inside ? 6 : 6.4,
		characterSpacing: -0.15,
		color: SOFT,
		margin: [0, 1, 0, 0] as [number, number, number, number]
	};
	return [
		{ text: inside ? '' : String(row.number), alignment: 'right', ...tone },
		{ text: row.name, margin: [inside ? 9 : 0, 0, 0, 0], ...tone },
		{ text: row.cas, ...code },
		{ text: row.function, ...tone },
		{ text: row.share, alignment: 'right', ...tone },
		{ text: row.range, alignment: 'right', ...tone },
		{ text: row.sources.map(letterOf).join(' '), color: SOFT, fontSize: tone.fontSize ?? SIZE }
	];
}

const sumRow = (word: string, sum: string): TableCell[] => [
	'',
	{ text: word, bold: true },
	'',
	'',
	{ text: sum, alignment: 'right', bold: true },
	'',
	''
];

function sourcesMargin(sources: readonly SourcePrint[], t: Phrases): Column {
	return {
		width: SOURCES_WIDTH,
		fontSize: SOURCE_SIZE,
		table: {
			widths: [12, '*'],
			headerRows: 1,
			dontBreakRows: fitsRows(sources.flatMap((source) => [source.name, source.detail])),
			body: [
				[{ text: t.file.sources, bold: true, colSpan: 2 }, ''],
				...sources.map((source, index): TableCell[] => [
					{ text: letterOf(index), bold: true },
					{ stack: [{ text: source.name }, { text: source.detail, color: SOFT, fontSize: SOURCE_SIZE - 0.5 }] }
				])
			]
		},
		layout: {
			hLineWidth: (index) => (index === 0 ? 0 : index === 1 ? 0.75 : 0.5),
			vLineWidth: (index) => (index === 0 ? 0.5 : 0),
			hLineColor: (index) => (index === 1 ? INK : RULE),
			vLineColor: () => RULE,
			paddingLeft: (index) => (index === 0 ? 9 : 2),
			paddingRight: () => 0,
			paddingTop: () => 1.9,
			paddingBottom: () => 1.9
		}
	};
}
