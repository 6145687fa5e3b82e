import { compose } from '$lib/domain/composition/compose';
import type { Composition, FormulaLine } from '$lib/domain/composition/types';
import { ingredientList } from '$lib/domain/ingredients/list';
import {
	GLOSSARY_ONLY,
	type AllergenEntry,
	type IngredientList,
	type Stay,
	type SubstanceIdentity
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
import type { ConstituentView, LineView, MaterialView } from '$lib/schemas/grid-view';

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

/** Composition and EU list of the lines as they stand, in the browser; null while they do not make a whole. */
export function computeLines(
	lines: readonly LineView[],
	materials: readonly MaterialView[],
	use: { readonly stay: Stay; readonly batchDay: IsoDate; readonly allergens: readonly AllergenEntry[] }
): Computed | null {
	if (lines.some((line) => line.kind === 'formula')) return null;
	const byCode = new Map(materials.map((material) => [material.code, material]));
	const formulaLines: FormulaLine[] = [];
	for (const line of lines) {
		const material = byCode.get(line.code);
		const weight = weightOf(line.percent);
		if (!material || weight === null) return null;
		formulaLines.push({
			id: line.id as Id<'line'>,
			phase: line.phase,
			material: material.id as Id<'material'>,
			amount: line.qs ? { kind: 'qs' } : { kind: 'share', min: null, share: weight, max: null }
		});
	}
	const formula = 'draft' as Id<'formula'>;
	const outcome = compose({
		formula,
		formulas: new Map([[formula, { formula, version: 'draft' as Id<'formulaVersion'>, lines: formulaLines }]]),
		materials: new Map(materials.map((material) => [material.id as Id<'material'>, versionOf(material)]))
	});
	if (!outcome.ok) return null;
	const substances = new Map(
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
	return {
		composition: outcome.value,
		substances,
		list: ingredientList(outcome.value, { market: 'EU', substances, names: GLOSSARY_ONLY, ...use })
	};
}

/** One row of a pasted block: a code or name and an amount, in whichever order the spreadsheet has them. */
export interface PastedRow {
	readonly name: string;
	readonly percent: string;
}

/** Reads a block from a spreadsheet: a column of amounts, or two columns of material and amount. */
export function readPaste(text: string): readonly PastedRow[] {
	return text
		.replace(/\r/g, '')
		.split('\n')
		.filter((row) => row.trim() !== '')
		.map((row) => {
			const cells = row.split('\t').map((cell) => cell.trim());
			const amounts = cells.filter((cell) => readShare(cell.replace(/\s*%$/, '')).ok);
			const percent = (amounts.at(-1) ?? '').replace(/\s*%$/, '');
			return { name: cells.find((cell) => cell !== '' && cell !== amounts.at(-1)) ?? '', percent };
		});
}

export interface LineConflict {
	readonly id: string;
	readonly mine: LineView | null;
	readonly theirs: LineView | null;
}
const same = (a: LineView | undefined, b: LineView | undefined) =>
	a?.percent === b?.percent && a?.qs === b?.qs && a?.phase === b?.phase && a?.code === b?.code;

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
