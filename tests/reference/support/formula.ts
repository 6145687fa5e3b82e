import { compose } from '../../../src/lib/domain/composition/compose';
import type { Composition, CompositionRequest, FormulaLine } from '../../../src/lib/domain/composition/types';
import { ingredientList } from '../../../src/lib/domain/ingredients/list';
import { colourIndexIn } from '../../../src/lib/domain/ingredients/names';
import type { IngredientList, Stay, SubstanceIdentity } from '../../../src/lib/domain/ingredients/types';
import { substanceKey } from '../../../src/lib/domain/material/substance-key';
import type { Constituent, MaterialVersion, PartRole, Use } from '../../../src/lib/domain/material/types';
import { decimalOf, formatExact } from '../../../src/lib/domain/quantity/decimal';
import type { Id, IsoDate, LineShare, PartShare } from '../../../src/lib/domain/quantity/units';
import { EU_ALLERGENS } from '../../../src/lib/reference';

/** "Glycerin 99.5", "Glycerin 50-60", "Aqua balance", "Titanium Dioxide nano 40", "of Parfum: Linalool 12". */
export interface Part {
	readonly inci: string;
	readonly min?: string;
	readonly typical?: string;
	readonly max?: string;
	readonly nano?: boolean;
	readonly use?: Use;
	readonly role?: PartRole;
	readonly ofWhich?: string;
	readonly cas?: string;
}
export interface Line {
	readonly material?: string;
	readonly formula?: string;
	readonly percent?: string;
	readonly min?: string;
	readonly max?: string;
	readonly qs?: boolean;
}

const part = (text: string | undefined) => (text === undefined ? null : (decimalOf(text, 8) as PartShare));
const line = (text: string | undefined) => (text === undefined ? null : (decimalOf(text, 6) as LineShare));

export function materialOf(name: string, parts: readonly Part[]): MaterialVersion {
	const id = (index: number) => `${name}/${index}` as Id<'constituent'>;
	return {
		id: `${name}@1` as Id<'materialVersion'>,
		material: name as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		contentHash: null,
		constituents: parts.map((each, index): Constituent => {
			const common = {
				id: id(index),
				substance: substanceKey(each.inci) as Id<'substance'>,
				declared: { low: part(each.min), typical: part(each.typical), high: part(each.max), highOpen: false },
				nano: each.nano ?? false,
				use: each.use ?? 'other',
				source: null
			};
			if (each.ofWhich === undefined) return { ...common, place: 'inSum', role: each.role ?? 'ingredient' };
			return { ...common, place: 'ofWhich', parent: id(parts.findIndex(({ inci }) => inci === each.ofWhich)) };
		})
	};
}

export type Materials = Readonly<Record<string, readonly Part[]>>;
export type Formulas = Readonly<Record<string, readonly Line[]>>;

export function requestOf(materials: Materials, formulas: Formulas, formula: string): CompositionRequest {
	return {
		formula: formula as Id<'formula'>,
		materials: new Map(
			Object.entries(materials).map(([name, parts]) => [name as Id<'material'>, materialOf(name, parts)])
		),
		formulas: new Map(
			Object.entries(formulas).map(([name, lines]) => [
				name as Id<'formula'>,
				{
					formula: name as Id<'formula'>,
					version: `${name}@1` as Id<'formulaVersion'>,
					lines: lines.map((each, index) => lineOf(name, each, index))
				}
			])
		)
	};
}

function lineOf(formula: string, each: Line, index: number): FormulaLine {
	const amount = each.qs
		? ({ kind: 'qs' } as const)
		: ({
				kind: 'share',
				min: line(each.min),
				share: line(each.percent) ?? (0n as LineShare),
				max: line(each.max)
			} as const);
	const common = { id: `${formula}#${index}` as Id<'line'>, phase: 'A', amount };
	return each.material !== undefined
		? { ...common, material: each.material as Id<'material'> }
		: { ...common, formula: each.formula as Id<'formula'> };
}

export function composed(materials: Materials, formulas: Formulas, formula = 'F'): Composition {
	const outcome = compose(requestOf(materials, formulas, formula));
	if (!outcome.ok) throw new Error(`faults: ${JSON.stringify(outcome.faults, (_k, v) => (typeof v === 'bigint' ? `${v}` : v))}`);
	return outcome.value;
}

export function substancesOf(materials: Materials): ReadonlyMap<Id<'substance'>, SubstanceIdentity> {
	const found = new Map<Id<'substance'>, SubstanceIdentity>();
	for (const each of Object.values(materials).flat()) {
		const key = substanceKey(each.inci);
		const id = key as Id<'substance'>;
		const cas = [...(found.get(id)?.cas ?? []), ...(each.cas ? [each.cas] : [])];
		found.set(id, { id, inci: each.inci, key, cas, colourIndex: colourIndexIn(each.inci) });
	}
	return found;
}

export const listOf = (
	materials: Materials,
	formulas: Formulas,
	{ stay = 'leave-on', day = '2026-12-01', formula = 'F' }: { stay?: Stay; day?: string; formula?: string } = {}
): IngredientList =>
	ingredientList(composed(materials, formulas, formula), {
		market: 'EU',
		stay,
		batchDay: day as IsoDate,
		substances: substancesOf(materials),
		allergens: EU_ALLERGENS
	});

/** The typical share of a name in %, exact. */
export function shareOf(list: IngredientList, name: string): string | undefined {
	const entry = list.entries.find((each) => each.name === name);
	return entry && formatExact(entry.share.typical, list.shareDecimals);
}

export const namesIn = (list: IngredientList, ...blocks: string[]) =>
	list.entries.filter((entry) => blocks.includes(entry.block)).map((entry) => entry.name);
