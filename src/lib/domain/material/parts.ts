import type { Range } from '../quantity/range';
import { faulty, good, least, most, sum, type Id, type Outcome, type PartShare } from '../quantity/units';
import { estimate, NOTHING, stated, type Stated } from './stated';
import type { MaterialFault, MaterialVersion, ResolvedPart } from './types';

export const partsOf = (version: MaterialVersion, parent: Id<'constituent'>): readonly Stated[] =>
	version.constituents.filter((part) => part.place === 'ofWhich' && part.parent === parent).map(stated);

/**
 * Parts of parts (an allergen inside a perfume), as shares of the material: each and all together at most their parent.
 * A typical that is not declared is the middle of the range, or less where the parent's typical leaves less; marked derived.
 */
export function resolveParts(
	version: MaterialVersion,
	parents: readonly ResolvedPart[]
): Outcome<readonly ResolvedPart[], MaterialFault> {
	const families = parents.map((parent) => resolveFamily(partsOf(version, parent.of.id), parent));
	const faults = families.flatMap((family) => (family.ok ? [] : family.faults));
	if (faults.length > 0) return faulty(...faults);
	return good(families.flatMap((family) => (family.ok ? family.value : [])));
}

function resolveFamily(
	parts: readonly Stated[],
	{ of, share: parent }: ResolvedPart
): Outcome<readonly ResolvedPart[], MaterialFault> {
	const lows = sum(parts.map((part) => part.low));
	if (lows > parent.high) {
		return faulty<MaterialFault>({ kind: 'partsAboveParent', parent: of.id, by: (lows - parent.high) as PartShare });
	}
	const ranges = parts.map((part) => narrowed(part, parent, (lows - part.low) as PartShare));
	const outside = parts.flatMap((part, at): MaterialFault[] => {
		const range = ranges[at];
		if (!range || part.typical === null || part.typical <= range.high) return [];
		return [{ kind: 'typicalOutsideRange', at: part.of.id, range }];
	});
	if (outside.length > 0) return faulty(...outside);
	const declared = sum(parts.map((part) => part.typical ?? NOTHING));
	// A derived typical of the parent is nobody's statement, so that nothing can contradict it.
	if (declared > parent.typical && parent.basis !== 'derived') {
		return faulty<MaterialFault>({
			kind: 'partsAboveParent',
			parent: of.id,
			by: (declared - parent.typical) as PartShare
		});
	}
	const typicals = derivedTypicals(parts, ranges, (parent.typical - declared) as PartShare);
	return good(
		parts.map((part, at) => {
			const range = ranges[at] ?? { low: part.low, high: part.high, highOpen: false };
			if (part.typical !== null) return estimate(part, range, part.typical, 'declared');
			return estimate(part, range, typicals[at] ?? range.low, 'derived');
		})
	);
}

function narrowed(part: Stated, parent: Range<PartShare>, siblings: PartShare): Range<PartShare> {
	const room = (parent.high - siblings) as PartShare;
	return { low: part.low, high: least(part.high, room), highOpen: parent.highOpen && room <= part.high };
}

/** One t of at most a half for all parts without a typical, so that together they fit into what the parent has left. */
function derivedTypicals(
	parts: readonly Stated[],
	ranges: readonly Range<PartShare>[],
	left: PartShare
): readonly bigint[] {
	const open = ranges.filter((_, at) => parts[at]?.typical === null);
	const room = open.reduce((total, range) => total + (range.high - range.low), 0n);
	const spare = most(0n, least(room / 2n, left - sum(open.map((range) => range.low))));
	return ranges.map((range) => (room === 0n ? range.low : range.low + ((range.high - range.low) * spare) / room));
}
