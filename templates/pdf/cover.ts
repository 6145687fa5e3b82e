import type { Column, Content, ContentSection } from 'pdfmake/interfaces';
import type { Phrases } from '../phrases/index';
import { EM, INK, LEAF, MARGIN, RULE, SOFT, cell, factsTable, inGroups, pageFoot } from './paper';
import { openChapters, type Chapter } from './plan';
import { formulaWords } from './words';
import type { IssuePrint, ProductFileData } from './types';

const EDGES = { left: 87, right: MARGIN.right } as const;
const LABEL_WIDTH = 136;
/** The last node of the document carries this id; its page is the number of pages. */
export const LAST_ID = 'last';

export function coverSection(data: ProductFileData, chapters: readonly Chapter[], t: Phrases): ContentSection {
	return {
		pageMargins: [EDGES.left, 60, EDGES.right, MARGIN.bottom],
		header: null,
		footer: (page: number, pages: number) => pageFoot(t.shared.caution, t.shared.pageOf(page, pages), EDGES),
		background: ribbon,
		section: [
			{ text: t.file.kind, fontSize: 11.8, color: SOFT, margin: [0, 158, 0, 0] },
			{
				text: data.productName,
				fontSize: titleSize(data.productName),
				bold: true,
				lineHeight: 0.92,
				characterSpacing: -0.8
			},
			{ text: data.subtitle, fontSize: 12.2, margin: [0, 4, 0, 18] },
			coverFacts(data, t),
			sealBox(data.issue, chapters, t)
		]
	};
}

/** A long name is set smaller rather than broken into a column of single words. */
const titleSize = (name: string) => (name.length <= 22 ? 40 : name.length <= 40 ? 30 : 22);

const ribbon = (): Content => ({
	canvas: [
		{
			type: 'polyline',
			closePath: true,
			lineWidth: 0,
			color: LEAF,
			points: [
				{ x: 47, y: 0 },
				{ x: 58.5, y: 0 },
				{ x: 58.5, y: 154 },
				{ x: 52.75, y: 147 },
				{ x: 47, y: 154 }
			]
		}
	]
});

function coverFacts(data: ProductFileData, t: Phrases): Content {
	const facts = t.file.facts;
	const lines = (first: string, second: string) => cell(`${first}\n${second}`);
	return factsTable(
		[
			[facts.responsiblePerson, lines(data.responsiblePerson.name, data.responsiblePerson.address)],
			[facts.compiledBy, lines(data.compiledBy.organisation, data.compiledBy.person)],
			[facts.formula, cell(formulaWords(data.formula, t))],
			[facts.rules, cell(data.rules)],
			[facts.inUse, cell(data.inUse ?? t.file.noBatch)],
			[facts.kept, cell(data.kept)]
		],
		LABEL_WIDTH
	);
}

/** Sealing fills the three lines; a trial leaves them empty and says in words what is open. */
function sealBox(issue: IssuePrint, chapters: readonly Chapter[], t: Phrases): Content {
	const sealed = issue.kind === 'sealed';
	const left: Column = {
		stack: [
			{ text: t.file.issue(issue.number), fontSize: 15.9, bold: true },
			{ text: [t.file.pages, { pageReference: LAST_ID }], color: SOFT }
		],
		width: LABEL_WIDTH - 12
	};
	const right: Column = {
		width: '*',
		table: {
			widths: [52, '*'],
			body: [
				[cell(t.file.sealedOn, { color: SOFT }), cell(sealed ? issue.date : ' ')],
				[cell(t.file.sealedBy, { color: SOFT }), cell(sealed ? issue.sealedBy : ' ')],
				[cell(t.file.manifest, { color: SOFT }), sealed ? manifestLine(issue.manifestHash) : cell(' ')]
			]
		},
		layout: SEAL_LINES
	};
	const words = sealed ? t.file.sealedNote : t.file.trial(issue.date, openSentence(chapters, t));
	return {
		margin: [0, 18, 0, 0],
		table: {
			widths: ['*'],
			body: [[{ stack: [{ columns: [left, right] }, { text: words, margin: [0, 10, 0, 0], fontSize: EM }] }]]
		},
		layout: DASHED
	};
}

const manifestLine = (hash: string): Content => ({
	text: inGroups(hash),
	font: 'Mono',
	fontSize: 6,
	margin: [0, 2, 0, 0]
});

function openSentence(chapters: readonly Chapter[], t: Phrases): string {
	const open = openChapters(chapters);
	return open.length === 0 ? t.file.trialNothingOpen : t.file.trialOpen(open);
}

const dash = () => ({ dash: { length: 2.2, space: 2 } });

const DASHED = {
	hLineWidth: () => 0.75,
	vLineWidth: () => 0.75,
	hLineColor: () => INK,
	vLineColor: () => INK,
	hLineStyle: dash,
	vLineStyle: dash,
	paddingLeft: () => 12.7,
	paddingRight: () => 12.7,
	paddingTop: () => 10.9,
	paddingBottom: () => 10.9
};

/** Lines under the three values only, as on a form. */
const SEAL_LINES = {
	hLineWidth: (index: number) => (index === 0 ? 0 : 0.5),
	vLineWidth: () => 0,
	hLineColor: () => RULE,
	paddingLeft: () => 0,
	paddingRight: () => 0,
	paddingTop: () => 2.5,
	paddingBottom: () => 2.5
};
