import { compose } from '$lib/domain/composition/compose';
import type { Composition, CompositionFault, CompositionRow } from '$lib/domain/composition/types';
import { compareNames } from '$lib/domain/ingredients/names';
import type { SubstanceIdentity } from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { compare, LINE_DECIMALS, PART_DECIMALS, type Id } from '$lib/domain/quantity/units';
import type { ComputeInput } from '$lib/schemas/compute';
import { compositionRequestsOf, refuseMissingFormula, refuseWrongIdentities, substancesOf } from './compute-input';

/** A composition of the call: the formula as it is, or one of its shades. */
export interface Shade {
	readonly name: string | null;
	readonly composition: Composition;
}
export interface Prepared {
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
	/** Empty when something is faulty. */
	readonly shades: readonly Shade[];
	readonly faults: readonly object[];
}

/** @throws Refused 'invalid' for a formula that was not sent and for identities with a wrong check digit. */
export function prepare(input: ComputeInput): Prepared {
	refuseMissingFormula(input);
	refuseWrongIdentities(input);
	const substances = substancesOf(input);
	const outcomes = compositionRequestsOf(input).map(({ name, request }) => ({ name, outcome: compose(request) }));
	const faults = outcomes.flatMap(({ outcome }) => (outcome.ok ? [] : outcome.faults));
	if (faults.length > 0) return { substances, shades: [], faults: faultViews(faults, input) };
	return {
		substances,
		shades: outcomes.flatMap(({ name, outcome }) => (outcome.ok ? [{ name, composition: outcome.value }] : [])),
		faults: []
	};
}

/** What a formula consists of, or each of its shades; a contradiction gives no rows and the faults that prevent them. */
export function computeComposition(input: ComputeInput) {
	const { substances, shades, faults } = prepare(input);
	const [first] = shades;
	if (!first) return { rows: [], faults };
	const nameOf = (row: CompositionRow) => substances.get(row.substance)?.inci ?? '';
	const rowsOf = (composition: Composition) =>
		[...composition.rows]
			.sort((a, b) => compare(b.share.typical, a.share.typical) || compareNames(nameOf(a), nameOf(b)))
			.map((row) => rowView(row, nameOf(row), composition));
	if (first.name === null) return { rows: rowsOf(first.composition), faults: [] };
	const byShade = Object.fromEntries(shades.map(({ name, composition }) => [name ?? '', rowsOf(composition)]));
	return { rows: rowsOf(first.composition), shades: byShade, faults: [] };
}

function rowView(row: CompositionRow, inci: string, composition: Composition) {
	const text = (value: bigint) => formatExact(value, composition.shareDecimals);
	return {
		inci,
		nano: row.nano,
		use: row.use,
		roles: [...row.roles],
		low: text(row.share.low),
		typical: text(row.share.typical),
		high: text(row.share.high),
		basis: row.share.basis,
		contributions: row.contributions.map((contribution) => ({
			path: [...contribution.formulas, contribution.material],
			low: text(contribution.share.low),
			typical: text(contribution.share.typical),
			high: text(contribution.share.high)
		}))
	};
}

/** The faults of a composition as the interface names them, each once. */
export function faultViews(faults: readonly CompositionFault[], input: Pick<ComputeInput, 'materials'>): object[] {
	const views = faults.flatMap((fault) => faultView(fault, input));
	return [...new Map(views.map((view) => [JSON.stringify(view), view])).values()];
}

function faultView(fault: CompositionFault, input: Pick<ComputeInput, 'materials'>): object[] {
	switch (fault.kind) {
		case 'material': {
			const { fault: inner, material } = fault;
			const by = 'by' in inner ? { by: formatExact(inner.by, PART_DECIMALS) } : {};
			const at = 'at' in inner ? inner.at : 'parent' in inner ? inner.parent : null;
			const index = at === null ? -1 : Number(at.slice(at.lastIndexOf('/') + 1));
			const inci = input.materials[material]?.constituents[index]?.inci;
			return [{ material, kind: inner.kind, ...by, ...(inci === undefined ? {} : { inci }) }];
		}
		case 'materialMissing':
			return [{ material: fault.material, kind: fault.kind }];
		case 'cycle':
			return [{ formula: fault.path[0], kind: fault.kind, path: fault.path }];
		case 'sumAbove100':
		case 'sumBelow100':
			return [{ formula: fault.formula, kind: fault.kind, by: formatExact(fault.by, LINE_DECIMALS) }];
		default:
			return [{ formula: fault.formula, kind: fault.kind }];
	}
}
