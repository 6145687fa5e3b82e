import { compose } from '$lib/domain/composition/compose';
import type { Composition, CompositionFault, FormulaLine } from '$lib/domain/composition/types';
import { ingredientList } from '$lib/domain/ingredients/list';
import type {
	AllergenEntry,
	IngredientList,
	Market,
	NameBook,
	Stay,
	SubstanceIdentity
} from '$lib/domain/ingredients/types';
import type { Constituent, MaterialVersion } from '$lib/domain/material/types';
import { decimalOf, formatExact, parseDecimal } from '$lib/domain/quantity/decimal';
import {
	LINE_DECIMALS,
	PART_DECIMALS,
	WHOLE_LINE,
	type Id,
	type IsoDate,
	type LineShare,
	type PartShare
} from '$lib/domain/quantity/units';
import { readShare } from '$lib/schemas/formula';
import type { BulkView, ConstituentView, LineView, MaterialView } from '$lib/schemas/grid-view';

const part = (text: string | null) => (text === null ? null : (decimalOf(text, PART_DECIMALS) as PartShare));

function constituentOf(view: ConstituentView): Constituent {
	const common = {
		id: view.id as Id<'constituent'>,
		substance: view.substance as Id<'substance'>,
		declared: { low: part(view.low), typical: part(view.typical), high: part(view.high), highOpen: view.highOpen },
		nano: view.nano,
		use: view.use,
		source: null
	};
	return view.place === 'ofWhich'
		? { ...common, place: 'ofWhich', parent: view.parent as Id<'constituent'> }
		: { ...common, place: 'inSum', role: view.role ?? 'ingredient' };
}

const versionOf = (view: MaterialView): MaterialVersion => ({
	id: view.versionId as Id<'materialVersion'>,
	material: view.id as Id<'material'>,
	number: view.number,
	effectiveFrom: null,
	contentHash: null,
	constituents: view.constituents.map(constituentOf)
});

/** What a typed amount weighs; null when it cannot be read. An empty cell weighs nothing yet. */
export function weightOf(percent: string): LineShare | null {
	if (percent.trim() === '') return 0n as LineShare;
	const parsed = readShare(percent);
	return parsed.ok ? (parsed.value as LineShare) : null;
}

export interface Balance {
	/** Everything but the q.s. line, in 10⁻⁶ %. */
	readonly stated: bigint;
	/** What the q.s. line takes; null without one. */
	readonly qs: bigint | null;
	readonly total: bigint;
	readonly readable: boolean;
}

export function balanceOf(lines: readonly LineView[]): Balance {
	const weights = lines.map((line) => (line.qs ? (0n as LineShare) : weightOf(line.percent)));
	const stated = weights.reduce<bigint>((sum, weight) => sum + (weight ?? 0n), 0n);
	const hasQs = lines.some((line) => line.qs);
	const qs = hasQs ? WHOLE_LINE - stated : null;
	return { stated, qs, total: stated + (qs ?? 0n), readable: weights.every((weight) => weight !== null) };
}

/** A batch size in 10⁻³ g; null when it cannot be read. */
export function readBatch(text: string): bigint | null {
	const parsed = parseDecimal(text, { decimals: 3 });
	return parsed.ok ? parsed.value : null;
}

export const percentText = (value: bigint) => formatExact(value, LINE_DECIMALS);

export interface Computed {
	readonly composition: Composition;
	readonly list: IngredientList;
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
}

/** What the lines name: materials, and bulks with what is below them. */
export interface Known {
	readonly materials: readonly MaterialView[];
	readonly bulks: readonly BulkView[];
}
/** What a list is judged by, beside the lines. */
export interface ListUse {
	readonly market: Market;
	readonly stay: Stay;
	readonly batchDay: IsoDate;
	readonly allergens: Readonly<Record<Market, readonly AllergenEntry[]>>;
	readonly names: NameBook;
}
/** `faults` says why there is no composition; empty while a line cannot be read or names what is not known yet. */
export interface Outcome {
	readonly computed: Computed | null;
	readonly faults: readonly CompositionFault[];
}
const NOTHING: Outcome = { computed: null, faults: [] };

/** The bulk that a line names, by its pin. */
export const bulkOf = (line: LineView, bulks: readonly BulkView[]): BulkView | null =>
	(line.kind === 'formula' && bulks.find(({ code, pinned }) => code === line.code && pinned === line.pinned)) || null;
/** One that is pinned is another bulk than the one that follows: both may stand in one formula. */
const keyOf = ({ id, pinned }: BulkView) => (pinned === null ? id : `${id}@${pinned}`) as Id<'formula'>;

function linesOf(lines: readonly LineView[], { materials, bulks }: Known): readonly FormulaLine[] | null {
	const found = lines.map((line): FormulaLine | null => {
		const [min, share, max] = [weightOf(line.min), weightOf(line.percent), weightOf(line.max)];
		if (min === null || share === null || max === null) return null;
		const range = (text: string, weight: LineShare) => (text.trim() === '' ? null : weight);
		const amount = line.qs
			? ({ kind: 'qs' } as const)
			: ({ kind: 'share', min: range(line.min, min), share, max: range(line.max, max) } as const);
		const common = { id: line.id as Id<'line'>, phase: line.phase, amount };
		if (line.kind === 'formula') {
			const bulk = bulkOf(line, bulks);
			return bulk && { ...common, formula: keyOf(bulk) };
		}
		const material = materials.find(({ code }) => code === line.code);
		return material ? { ...common, material: material.id as Id<'material'> } : null;
	});
	return found.every((line) => line !== null) ? found : null;
}

/** Composition and one market's list of the lines as they stand, in the browser; null while they do not make a whole. */
export function computeLines(lines: readonly LineView[], known: Known, formulaId: string, use: ListUse): Outcome {
	const formula = formulaId as Id<'formula'>;
	const own = linesOf(lines, known);
	if (!own || own.length === 0) return NOTHING;
	const formulas = new Map([[formula, { formula, version: 'draft' as Id<'formulaVersion'>, lines: own }]]);
	for (const bulk of known.bulks) {
		const below = linesOf(bulk.lines, known);
		const id = keyOf(bulk);
		if (below && id !== formula)
			formulas.set(id, { formula: id, version: bulk.code as Id<'formulaVersion'>, lines: below });
	}
	const materials = new Map(known.materials.map((each) => [each.id as Id<'material'>, versionOf(each)]));
	const outcome = compose({ formula, formulas, materials });
	if (!outcome.ok) return { computed: null, faults: outcome.faults };
	const substances = substancesOf(known.materials);
	const request = { ...use, substances, allergens: use.allergens[use.market] };
	return {
		computed: { composition: outcome.value, substances, list: ingredientList(outcome.value, request) },
		faults: []
	};
}

const substancesOf = (materials: readonly MaterialView[]) =>
	new Map(
		materials.flatMap(({ constituents }) =>
			constituents.map((view): [Id<'substance'>, SubstanceIdentity] => [
				view.substance as Id<'substance'>,
				{
					id: view.substance as Id<'substance'>,
					inci: view.inci,
					key: view.key,
					cas: view.cas,
					colourIndex: view.colourIndex
				}
			])
		)
	);

/** One row of a pasted block: every text that may name the line, and its amount as it was written. */
export interface PastedRow {
	readonly names: readonly string[];
	readonly percent: string;
	readonly qs: boolean;
}

const QS = /^(q\.?\s*s\.?p?\.?|ad|to)(\s*(ad|to)?\s*100\s*%?)?$/i;
const PERCENT_HEAD = /%|w\s*\/\s*w|percent/i;
const amountIn = (cell: string) => {
	const parsed = readShare(cell.replace(/\s*%$/, ''));
	return parsed.ok ? parsed.value : null;
};
const isAmount = (cell: string) => amountIn(cell) !== null || QS.test(cell);

/**
 * Reads a block from a spreadsheet. The column of amounts is the one that its head calls %, else the one that sums to 100, else
 * the first behind a name: a block may carry line numbers, phases and grams as well.
 */
export function readPaste(text: string): readonly PastedRow[] {
	const rows = text
		.replace(/\r/g, '')
		.split('\n')
		.filter((row) => row.trim() !== '')
		.map((row) => row.split('\t').map((cell) => cell.trim()));
	const [head = [], ...below] = rows;
	const headed = below.length > 0 && !head.some(isAmount);
	const body = headed ? below : rows;
	const named = headed ? head.findIndex((cell) => PERCENT_HEAD.test(cell)) : -1;
	const column = named >= 0 ? named : columnOfAmounts(body);
	return body.map((cells) => {
		const cell = cells[column] ?? '';
		const qs = QS.test(cell);
		return {
			names: cells.filter((each, at) => at !== column && /[^\d\s.,%]/.test(each)),
			percent: qs ? '' : cell.replace(/\s*%$/, ''),
			qs
		};
	});
}

function columnOfAmounts(rows: readonly (readonly string[])[]): number {
	const width = Math.max(0, ...rows.map((cells) => cells.length));
	const columns = Array.from({ length: width }, (_, at) => at);
	const readable = columns.filter((at) => rows.some((cells) => isAmount(cells[at] ?? '')));
	const sumOf = (at: number) => rows.reduce((sum, cells) => sum + (amountIn(cells[at] ?? '') ?? 0n), 0n);
	const whole = readable.find((at) => sumOf(at) === WHOLE_LINE);
	if (whole !== undefined) return whole;
	const firstName = columns.find((at) => rows.some((cells) => (cells[at] ?? '') !== '' && !isAmount(cells[at] ?? '')));
	return readable.find((at) => firstName === undefined || at > firstName) ?? readable[0] ?? (firstName ?? 0) + 1;
}

export interface LineConflict {
	readonly id: string;
	readonly mine: LineView | null;
	readonly theirs: LineView | null;
}
const same = (a: LineView | undefined, b: LineView | undefined) =>
	a?.percent === b?.percent &&
	a?.min === b?.min &&
	a?.max === b?.max &&
	a?.qs === b?.qs &&
	a?.phase === b?.phase &&
	a?.code === b?.code &&
	a?.pinned === b?.pinned;

/**
 * Joins two people's edits of the same lines, by line: what only one changed is taken, what both changed is a conflict that
 * shows both values, and nothing that either typed is lost.
 */
export function mergeLines(
	base: readonly LineView[],
	mine: readonly LineView[],
	theirs: readonly LineView[]
): { readonly lines: readonly LineView[]; readonly conflicts: readonly LineConflict[] } {
	const at = (lines: readonly LineView[], id: string) => lines.find((line) => line.id === id);
	const ids = [...new Set([...theirs, ...mine].map((line) => line.id))];
	const lines: LineView[] = [];
	const conflicts: LineConflict[] = [];
	for (const id of ids) {
		const [was, my, their] = [at(base, id), at(mine, id), at(theirs, id)];
		const chosen = same(was, my) ? their : my;
		if (chosen) lines.push(chosen);
		if (same(was, my) || same(was, their) || same(my, their)) continue;
		conflicts.push({ id, mine: my ?? null, theirs: their ?? null });
	}
	return { lines, conflicts };
}
