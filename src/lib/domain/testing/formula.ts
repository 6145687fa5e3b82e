import { compose } from '../composition/compose';
import type { Composition, CompositionRequest, FormulaLine } from '../composition/types';
import { colourIndexIn } from '../ingredients/colour-names';
import type { SubstanceIdentity } from '../ingredients/types';
import { substanceKey } from '../material/substance-key';
import type { Constituent, MaterialVersion, PartRole, Use } from '../material/types';
import { decimalOf } from '../quantity/decimal';
import type { Id, LineShare, PartShare } from '../quantity/units';

/** One constituent as a test writes it; `ofWhich` names the constituent that holds it. */
export interface Part {
	readonly inci: string;
	readonly min?: string;
	readonly typical?: string;
	readonly max?: string;
	/** The maximum is "less than". */
	readonly open?: boolean;
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
				declared: {
					low: part(each.min),
					typical: part(each.typical),
					high: part(each.max),
					highOpen: each.open ?? false
				},
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
	if (!outcome.ok)
		throw new Error(`faults: ${JSON.stringify(outcome.faults, (_k, v) => (typeof v === 'bigint' ? `${v}` : v))}`);
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
