import type { TableCell, TDocumentDefinitions } from 'pdfmake/interfaces';
import { phrasesIn, type Phrases } from '../phrases/index';
import { DEFAULT_STYLE, MARGIN, ROWS, SOFT, TABLE, headCell, lead, note, pageFoot, runningHead } from './paper';
import type { BatchSheetData } from './types';

/** The sheet that a batch is weighed by: what is planned, and room for what the balance showed and the lot it came from. */
export function batchSheetDocument(data: BatchSheetData): TDocumentDefinitions {
	const t = phrasesIn(data.language);
	const edges = { left: MARGIN.left, right: MARGIN.right };
	const title = t.batch.title(data.formulaName);
	return {
		pageSize: 'A4',
		defaultStyle: DEFAULT_STYLE,
		pageMargins: [MARGIN.left, MARGIN.top, MARGIN.right, MARGIN.bottom],
		header: () => runningHead(title, t.batch.formula(data.formulaCode, data.version, data.released), edges),
		footer: (page: number, pages: number) => pageFoot(data.laboratory, t.shared.pageOf(page, pages), edges),
		content: [
			{ text: title, fontSize: 15.9, bold: true, lineHeight: 1 },
			lead(t.batch.lead(data.size, data.step)),
			{ fontSize: TABLE, table: { widths: [36, '*', 66, 66, 66], headerRows: 1, body: rows(data, t) }, layout: ROWS },
			note(t.batch.signature),
			note(t.batch.caution)
		]
	};
}

function rows({ lines, total }: BatchSheetData, t: Phrases): TableCell[][] {
	return [
		[
			headCell(t.batch.phase),
			headCell(t.batch.material),
			headCell(t.batch.planned, 'right'),
			headCell(t.batch.weighed, 'right'),
			headCell(t.batch.lot)
		],
		...lines.map(({ code, name, phase, within, amount, lot }): TableCell[] => [
			{ text: phase },
			{
				stack: [
					{ text: [`${name}  `, { text: code, font: 'Mono', fontSize: 7, color: SOFT }] },
					...(within === '' ? [] : [{ text: t.batch.within(within), color: SOFT }]),
					...(lot === '' ? [] : [{ text: t.batch.corrected(lot), color: SOFT }])
				]
			},
			{ text: amount, alignment: 'right', bold: true },
			{ text: ' ' },
			{ text: ' ' }
		]),
		[
			{ text: ' ' },
			{ text: t.batch.total, bold: true },
			{ text: total, alignment: 'right', bold: true },
			{ text: ' ' },
			{ text: ' ' }
		]
	];
}
