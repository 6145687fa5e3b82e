import type { Content, CustomTableLayout, Margins, TDocumentDefinitions } from 'pdfmake/interfaces';

/** Colours on paper. Nothing is said by colour alone; only the mark of a copy that is not approved is red. */
export const INK = '#1C2923';
export const SOFT = '#54625A';
export const RULE = '#DDD8CB';
export const LEAF = '#23604A';
export const MADDER = '#9A2C3B';

/** Points. Body text is 9 pt; the rest follows from it as drawn. */
export const EM = 9.07;
export const SMALL = 7.6;
export const TABLE = 8.2;

export const A4 = { width: 595.28, height: 841.89 } as const;
export const MARGIN = { left: 62.6, right: 50.8, top: 79, bottom: 62 } as const;
/** A marked page is narrower: the strip at its side needs room. */
export const MARKED_RIGHT = 76;

export const DEFAULT_STYLE: TDocumentDefinitions['defaultStyle'] = {
	font: 'Noto',
	fontSize: EM,
	lineHeight: 1.06,
	color: INK
};

export interface Edges {
	readonly left: number;
	readonly right: number;
}

export const widthBetween = (edges: Edges) => A4.width - edges.left - edges.right;

const rule = (width: number, color: string, lineWidth: number, margin: Margins = 0): Content => ({
	canvas: [{ type: 'line', x1: 0, y1: 0, x2: width, y2: 0, lineWidth, lineColor: color }],
	margin
});

/** Running head: what it is on the left, which state of it on the right, an ink line beneath. */
export function runningHead(left: string, right: Content, edges: Edges): Content {
	return {
		margin: [edges.left, 45, edges.right, 0],
		fontSize: SMALL,
		color: SOFT,
		stack: [
			{
				columns: [
					{ text: left, width: '*' },
					{ text: right, width: 'auto', alignment: 'right', noWrap: true }
				],
				columnGap: 18
			},
			rule(widthBetween(edges), INK, 0.75, [0, 4, 0, 0])
		]
	};
}

/** Foot of every page: who answers for it on the left, the page and the number of pages on the right. */
export function pageFoot(left: Content, page: string, edges: Edges): Content {
	return {
		margin: [edges.left, 12, edges.right, 0],
		fontSize: SMALL,
		color: SOFT,
		stack: [
			rule(widthBetween(edges), RULE, 0.6),
			{
				columns: [
					{ text: left, width: '*' },
					{ text: page, width: 'auto', color: INK, alignment: 'right', noWrap: true }
				],
				columnGap: 18,
				margin: [0, 5, 0, 0]
			}
		]
	};
}

const isHead = (index: number, heads: number | undefined) => index === (heads ?? 0);

/** Rows divided by thin rules, one ink line under the head, none upright: the table of the house. */
export const ROWS: CustomTableLayout = {
	hLineWidth: (index, node) => {
		if (index === 0) return 0;
		return isHead(index, node.table.headerRows) ? 0.75 : 0.5;
	},
	vLineWidth: () => 0,
	hLineColor: (index, node) => (isHead(index, node.table.headerRows) ? INK : RULE),
	paddingLeft: (index) => (index === 0 ? 0 : 4.5),
	paddingRight: (index, node) => (index === (node.table.widths?.length ?? 0) - 1 ? 0 : 4.5),
	paddingTop: () => 2.4,
	paddingBottom: () => 2.4
};

/** The same with more air, where each row is read as a sentence. */
export const AIRY_ROWS: CustomTableLayout = { ...ROWS, paddingTop: () => 3.5, paddingBottom: () => 3.5 };

export const cell = (text: Content, more: object = {}): Content => ({ text, ...more }) as Content;

export const headCell = (text: string, alignment: 'left' | 'right' = 'left'): Content => ({
	text,
	alignment,
	color: SOFT,
	bold: true,
	fontSize: SMALL
});

/** Label and value, one under the other, divided by rules; an ink line above the first. */
export function factsTable(rows: readonly (readonly [string, Content])[], labelWidth: number, air = 4.6): Content {
	return {
		table: {
			widths: [labelWidth, '*'],
			body: rows.map(([label, value]) => [{ text: label, color: SOFT }, value])
		},
		layout: {
			hLineWidth: (index, node) => (index === node.table.body.length ? 0 : index === 0 ? 0.75 : 0.5),
			vLineWidth: () => 0,
			hLineColor: (index) => (index === 0 ? INK : RULE),
			paddingLeft: () => 0,
			paddingRight: () => 6,
			paddingTop: () => air,
			paddingBottom: () => air
		}
	};
}

export const lead = (text: string, margin: Margins = [0, 2, 0, 9]): Content => ({ text, color: SOFT, margin });
export const note = (text: string, margin: Margins = [0, 7, 0, 0]): Content => ({
	text,
	color: SOFT,
	fontSize: SMALL,
	margin
});
export const subheading = (text: string): Content => ({ text, bold: true, margin: [0, 11, 0, 3] });

/** Numbered sentences with the number in the margin of the text. */
export function numbered(sentences: readonly string[]): Content {
	return {
		stack: sentences.map((sentence, index) => ({
			columns: [
				{ text: String(index + 1), width: 14, color: SOFT },
				{ text: sentence, width: '*' }
			],
			margin: [0, 2, 0, 2] satisfies Margins
		}))
	};
}

/** A long code is cut into groups so that it can break and be read aloud. */
export const inGroups = (code: string, size = 8) => code.match(new RegExp(`.{1,${size}}`, 'g'))?.join(' ') ?? '';

export const hashLine = (hash: string, fontSize = 6.6): Content => ({
	text: inGroups(hash),
	font: 'Mono',
	fontSize,
	color: SOFT,
	margin: [0, 1, 0, 0]
});

/** Room that a text takes, in characters; a line break counts as most of a line. */
export const weightOf = (...texts: readonly string[]) =>
	texts.reduce((sum, text) => sum + text.length + 40 * (text.split('\n').length - 1), 0);

/**
 * pdfmake cannot break what is marked as unbreakable: whatever is taller than a page would be lost. So rows and blocks
 * are held together only while they are surely shorter.
 */
export const ROW_LIMIT = 400;
export const WIDE_ROW_LIMIT = 1500;
export const BLOCK_LIMIT = 1800;

export const fitsRows = (texts: readonly string[], limit = ROW_LIMIT) => texts.every((text) => weightOf(text) <= limit);

/** A title with what follows it; held together when short, so that no title stands alone at the foot of a page. */
export function titledBlock(heading: string, body: Content, weight: number, fontSize: number): Content {
	return { stack: [subheading(heading), body], unbreakable: weight <= BLOCK_LIMIT, fontSize };
}
