import type { Content, ContentSection, TDocumentDefinitions } from 'pdfmake/interfaces';
import { phrasesIn, type Phrases } from '../phrases/index';
import { COPIES_ID, contentsPage, copyId } from './contents';
import { LAST_ID, coverSection } from './cover';
import { evidenceList } from './evidence-list';
import { copySection } from './label-copy';
import { DEFAULT_STYLE, MARGIN, ROWS, SMALL, SOFT, TABLE, cell, headCell, lead, pageFoot, runningHead } from './paper';
import { COPIES_NUMBER, chaptersOf } from './plan';
import { chapterContent, titleContent } from './section-page';
import type { PrintTools } from './tools';
import { stateWords } from './words';
import type { ProductFileData } from './types';

/**
 * The product information file: cover, contents, the sections of the law, the label copies and the list of evidence.
 * Pages are counted through; every section and heading is a bookmark.
 */
export function productFile(data: ProductFileData, tools: PrintTools): TDocumentDefinitions {
	const t = phrasesIn(data.language);
	const chapters = chaptersOf(data);
	const body = pages(data, t, [
		contentsPage(data, chapters, t),
		...chapters.map((chapter) => chapterContent(chapter, data, t)),
		copiesOpening(data, t)
	]);
	const copies = data.copies.map((copy, index) =>
		copySection(copy, tools, {
			id: copyId(index),
			outlineParentId: COPIES_ID,
			number: `${COPIES_NUMBER}.${index + 1}`
		})
	);
	const evidence = pages(data, t, [
		...evidenceList(data.evidence, t),
		{ text: t.shared.caution, id: LAST_ID, color: SOFT, fontSize: SMALL, margin: [0, 9, 0, 0] }
	]);
	return {
		pageSize: 'A4',
		defaultStyle: DEFAULT_STYLE,
		content: [coverSection(data, chapters, t), body, ...copies, evidence]
	};
}

function pages(data: ProductFileData, t: Phrases, content: Content[]): ContentSection {
	const { issue, responsiblePerson: person } = data;
	const state =
		issue.kind === 'trial'
			? t.file.runningTrial(issue.number, issue.date)
			: t.file.runningSealed(issue.number, issue.date);
	return {
		pageMargins: [MARGIN.left, MARGIN.top, MARGIN.right, MARGIN.bottom],
		header: () => runningHead(t.file.running(data.productName), state, MARGIN),
		footer: (page: number, total: number) =>
			pageFoot(t.file.address(person.name, person.address), t.shared.pageOf(page, total), MARGIN),
		background: null,
		section: content
	};
}

function copiesOpening(data: ProductFileData, t: Phrases): Content {
	return {
		pageBreak: 'before',
		stack: [
			titleContent({ id: COPIES_ID, number: String(COPIES_NUMBER), words: t.file.copies.title }),
			lead(data.copies.length === 0 ? t.file.copies.none : t.file.copies.lead(data.copies.length)),
			copiesTable(data, t)
		]
	};
}

/** The copies in their order with what they stand at; each follows on pages of its own. */
function copiesTable(data: ProductFileData, t: Phrases): Content {
	if (data.copies.length === 0) return { text: '' };
	return {
		fontSize: TABLE,
		table: {
			widths: [20, '*', 160, 26],
			headerRows: 1,
			dontBreakRows: true,
			body: [
				[
					headCell(' '),
					headCell(t.file.copies.copy),
					headCell(t.copy.facts.state),
					headCell(t.file.contentsPage, 'right')
				],
				...data.copies.map((copy, index) => [
					cell(`${COPIES_NUMBER}.${index + 1}`),
					cell(t.copy.title(copy.packName, copy.marketName)),
					cell(stateWords(copy, t), { color: SOFT }),
					{ pageReference: copyId(index), alignment: 'right' as const }
				])
			]
		},
		layout: ROWS
	};
}
