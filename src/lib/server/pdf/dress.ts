import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces';
import { FAMILIES, type Family, type FontShelf } from './fonts';
import { splitRuns } from './runs';

type Node = Readonly<Record<string, unknown>>;

const isNode = (value: unknown): value is Node => typeof value === 'object' && value !== null && !Array.isArray(value);
const isFamily = (value: unknown): value is Family => FAMILIES.some((family) => family === value);

/** The keys under which a definition holds further content; everything else is passed through untouched. */
const HOLDERS = ['stack', 'columns', 'ul', 'ol', 'section'] as const;

/** Content that is made anew for every page. */
const MAKERS = ['header', 'footer', 'background'] as const;

function dressText(text: unknown, base: Family, shelf: FontShelf): unknown {
	if (typeof text === 'string') {
		const runs = splitRuns(text, base, shelf);
		const [first] = runs;
		if (!first) return '';
		if (runs.length === 1 && first.family === base) return first.text;
		return runs.map((run) => (run.family === base ? run.text : { text: run.text, font: run.family }));
	}
	if (Array.isArray(text)) return text.map((part) => dressNode(part, base, shelf));
	return text;
}

function dressNode(value: unknown, inherited: Family, shelf: FontShelf): unknown {
	if (typeof value === 'string') return { text: dressText(value, inherited, shelf) };
	if (Array.isArray(value)) return value.map((child) => dressNode(child, inherited, shelf));
	if (!isNode(value)) return value;
	const base = isFamily(value.font) ? value.font : inherited;
	const dressed: Record<string, unknown> = { ...value };
	if ('text' in value) dressed.text = dressText(value.text, base, shelf);
	for (const key of HOLDERS) if (key in value) dressed[key] = dressNode(value[key], base, shelf);
	for (const key of MAKERS) {
		const maker = value[key];
		if (typeof maker === 'function') dressed[key] = (...given: unknown[]) => dressNode(maker(...given), base, shelf);
	}
	if (isNode(value.table)) dressed.table = dressTable(value.table, base, shelf);
	return dressed;
}

const dressTable = (table: Node, base: Family, shelf: FontShelf): Node => ({
	...table,
	body: Array.isArray(table.body)
		? table.body.map((row: unknown) => (Array.isArray(row) ? row.map((cell) => dressNode(cell, base, shelf)) : row))
		: table.body
});

/**
 * Gives every text of a definition a family that has its glyphs. pdfmake and its types know content as a wide union of
 * shapes; the walk keeps every shape as it is, hence the two casts at its border.
 */
export function dress(definition: TDocumentDefinitions, shelf: FontShelf): TDocumentDefinitions {
	const { content, ...rest } = definition;
	const around = dressNode(rest, 'Noto', shelf) as Omit<TDocumentDefinitions, 'content'>;
	return { ...around, content: dressNode(content, 'Noto', shelf) as Content };
}
