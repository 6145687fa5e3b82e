import type { Content, TableCell } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { EVIDENCE_ID, evidenceId } from './contents';
import { ROWS, SOFT, TABLE, fitsRows, hashLine, headCell, lead } from './paper';
import { EVIDENCE_NUMBER } from './plan';
import { titleContent } from './section-page';
import type { EvidencePrint } from './types';

/** Every linked document with its full hash, so that a paper copy can be checked against the file. */
export function evidenceList(evidence: readonly EvidencePrint[], t: Phrases): Content[] {
	const words = t.file.evidence;
	const title = titleContent({ id: EVIDENCE_ID, number: String(EVIDENCE_NUMBER), words: words.title });
	if (evidence.length === 0) return [title, lead(words.none)];
	return [
		title,
		lead(words.lead),
		{
			fontSize: TABLE,
			table: {
				widths: [14, '*', 34, 66],
				headerRows: 1,
				dontBreakRows: fitsRows(evidence.map((document) => document.title)),
				body: [
					[headCell(' '), headCell(words.document), headCell(words.pages, 'right'), headCell(words.dated)],
					...evidence.map((document, index) => documentRow(document, index))
				]
			},
			layout: ROWS
		}
	];
}

function documentRow(document: EvidencePrint, index: number): TableCell[] {
	const kind = document.note === '' ? document.kind : `${document.kind}; ${document.note}`;
	return [
		{ text: String(index + 1), alignment: 'right', color: SOFT },
		{
			stack: [
				{ text: document.title, id: evidenceId(index), bold: true },
				{ text: kind, color: SOFT },
				hashLine(document.sha256, 6.4)
			]
		},
		{ text: document.pages === null ? '–' : String(document.pages), alignment: 'right' },
		{ text: document.dated }
	];
}
