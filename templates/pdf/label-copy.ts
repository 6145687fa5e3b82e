import type { Content, ContentSection, TDocumentDefinitions } from 'pdfmake/interfaces';
import { phrasesIn, type Phrases } from '../phrases/index';
import { markBackground, markOf, markWords } from './mark';
import {
	AIRY_ROWS,
	DEFAULT_STYLE,
	INK,
	MARGIN,
	MARKED_RIGHT,
	SMALL,
	SOFT,
	TABLE,
	cell,
	fitsRows,
	hashLine,
	factsTable,
	headCell,
	lead,
	note,
	numbered,
	pageFoot,
	runningHead,
	titledBlock,
	weightOf,
	WIDE_ROW_LIMIT
} from './paper';
import { formulaWords, stateWords } from './words';
import type { PrintTools } from './tools';
import type { ElementPrint, IngredientListPrint, LabelCopyData } from './types';

/** Where a copy stands inside a larger document: its bookmark hangs under a parent, and pages are counted there. */
export interface CopyPlace {
	readonly id: string;
	readonly outlineParentId?: string;
	/** Printed before the title, for example `8.1`. */
	readonly number?: string;
}

const LABEL_WIDTH = 92;

/** The whole document of one copy. */
export function labelCopy(copy: LabelCopyData, tools: PrintTools): TDocumentDefinitions {
	return {
		pageSize: 'A4',
		defaultStyle: DEFAULT_STYLE,
		content: [copySection(copy, tools, { id: 'copy' })]
	};
}

/** One copy as pages of their own, with their own head, foot and mark. */
export function copySection(copy: LabelCopyData, tools: PrintTools, place: CopyPlace): ContentSection {
	const t = phrasesIn(copy.language);
	const mark = markOf(copy);
	const words = mark === null ? null : t.copy.marks[mark];
	const edges = { left: MARGIN.left, right: words === null ? MARGIN.right : MARKED_RIGHT };
	const edition = copy.number === null ? t.copy.noEdition : t.copy.edition(copy.number);
	const head: Content = words === null ? edition : [`${edition}, `, markWords(words)];
	const foot: Content = words === null ? t.copy.compareNow : [`${t.copy.compareAfter} `, markWords(words)];
	return {
		pageMargins: [edges.left, MARGIN.top, edges.right, MARGIN.bottom],
		header: () => runningHead(t.copy.running(copy.productName), head, edges),
		footer: (page: number, pages: number) => pageFoot(foot, t.shared.pageOf(page, pages), edges),
		background: words === null ? null : markBackground(words, tools),
		section: [
			title(copy, t, place),
			lead(copyLead(copy, t)),
			elementTable(copy.elements, t),
			ingredientBlock(copy.list, t),
			openBlock(copy, t),
			standing(copy, t),
			decisions(copy, t),
			cautions(t)
		]
	};
}

function title(copy: LabelCopyData, t: Phrases, place: CopyPlace): Content {
	const words = t.copy.title(copy.packName, copy.marketName);
	return {
		text: place.number ? `${place.number}  ${words}` : words,
		id: place.id,
		outline: true,
		outlineText: place.outlineParentId ? words : t.copy.running(copy.productName),
		outlineParentId: place.outlineParentId,
		fontSize: 15.9,
		bold: true,
		lineHeight: 1,
		margin: [0, 0, 0, 1]
	};
}

const copyLead = (copy: LabelCopyData, t: Phrases) =>
	t.copy.lead(t.copy.language, formulaWords(copy.formula, t), countOf(copy.list), copy.madeOn);

const countOf = (list: IngredientListPrint) => list.names.length + list.mayContain.length;

function elementTable(elements: readonly ElementPrint[], t: Phrases): Content {
	const rows = elements.map((row) => [
		cell(t.copy.elements[row.element]),
		row.text === null ? cell(t.copy.missing, { italics: true, color: SOFT }) : cell(row.text, { bold: row.prescribed }),
		cell(row.requiredBy, { color: SOFT })
	]);
	const whole = fitsRows(
		elements.map((row) => row.text ?? ''),
		WIDE_ROW_LIMIT
	);
	return {
		fontSize: TABLE,
		table: {
			widths: [LABEL_WIDTH, '*', 84],
			headerRows: 1,
			keepWithHeaderRows: whole ? 1 : 0,
			dontBreakRows: whole,
			body: [[headCell(t.copy.element), headCell(t.copy.language), headCell(t.copy.requiredBy)], ...rows]
		},
		layout: AIRY_ROWS
	};
}

/** The list as it is printed on the pack, in reading order; names whose order is open are underlined with dashes. */
function ingredientBlock(list: IngredientListPrint, t: Phrases): Content {
	const names = list.names.map((entry, index): Content => {
		const text = index < list.names.length - 1 ? `${entry.name}, ` : entry.name;
		return entry.undecided ? { text, decoration: 'underline', decorationStyle: 'dashed' } : text;
	});
	const may: Content = list.mayContain.length > 0 ? ` [${t.copy.mayContain}: ${list.mayContain.join(', ')}]` : '';
	const rest: Content[] = list.names.some((entry) => entry.undecided) ? [note(t.copy.undecidedNote, [0, 4, 0, 0])] : [];
	return {
		margin: [0, 13, 0, 0],
		table: {
			widths: ['*'],
			body: [
				[
					{
						stack: [
							{
								fontSize: SMALL,
								columns: [
									{ text: t.copy.ingredients, bold: true, width: 'auto' },
									{ text: t.copy.listNote(countOf(list), list.requiredBy), alignment: 'right', color: SOFT, width: '*' }
								],
								margin: [0, 0, 0, 4]
							},
							{ text: [{ text: `${list.heading}: `, bold: true }, ...names, may], fontSize: 9.8, lineHeight: 1.2 },
							...rest
						]
					}
				]
			]
		},
		layout: {
			hLineWidth: () => 0.75,
			vLineWidth: () => 0,
			hLineColor: () => INK,
			paddingLeft: () => 0,
			paddingRight: () => 0,
			paddingTop: () => 8,
			paddingBottom: () => 8
		}
	};
}

const cautions = (t: Phrases): Content => ({
	stack: t.copy.cautions.map((caution, index) => note(caution, [0, index === 0 ? 10 : 1.5, 0, 0])),
	unbreakable: true
});

function openBlock(copy: LabelCopyData, t: Phrases): Content {
	const blocks: Content[] = [];
	if (copy.outOfDate !== null) {
		blocks.push(titledBlock(t.copy.openOutOfDate, numbered([copy.outOfDate]), weightOf(copy.outOfDate), 8.6));
	}
	if (copy.open.length > 0) blocks.push(titledBlock(t.copy.open, numbered(copy.open), linesOf(copy.open), 8.6));
	return { stack: blocks };
}

/** Short sentences still take a line each. */
const linesOf = (sentences: readonly string[]) =>
	sentences.reduce((sum, sentence) => sum + Math.max(60, weightOf(sentence)), 0);

function standing(copy: LabelCopyData, t: Phrases): Content {
	const facts = t.copy.facts;
	const rows: [string, Content][] = [
		[facts.client, cell(copy.clientName)],
		[facts.number, cell(copy.number === null ? t.copy.numberLater : String(copy.number))],
		[facts.state, cell(stateWords(copy, t))],
		[facts.hash, copy.contentHash === null ? cell(t.copy.notFrozen) : hashLine(copy.contentHash)],
		[facts.formula, cell(formulaWords(copy.formula, t))],
		[facts.rules, cell(copy.rules)],
		[facts.compiledBy, cell(copy.compiledBy)]
	];
	if (copy.inUseFrom !== null) rows.push([facts.inUse, cell(t.copy.batch(copy.inUseFrom))]);
	const weight = 700 + weightOf(copy.clientName, copy.rules, copy.compiledBy);
	return titledBlock(t.copy.standing, factsTable(rows, LABEL_WIDTH, 2.2), weight, TABLE);
}

function decisions(copy: LabelCopyData, t: Phrases): Content {
	if (copy.approvals.length === 0) {
		return titledBlock(t.copy.approvals, { text: t.copy.noApprovals, color: SOFT }, 0, TABLE);
	}
	const rows = copy.approvals.map((entry): [string, Content] => [
		t.copy.decidedBy[entry.role],
		{
			stack: [
				{ text: `${t.copy.decision[entry.decision]}, ${entry.name}, ${entry.date}` },
				...(entry.comment === null ? [] : [{ text: entry.comment, color: SOFT }])
			]
		}
	]);
	const weight = linesOf(copy.approvals.map((entry) => `${entry.name}${entry.comment ?? ''}`));
	return titledBlock(t.copy.approvals, factsTable(rows, LABEL_WIDTH, 2.2), weight, TABLE);
}
