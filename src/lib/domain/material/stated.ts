import type { Range, TypicalBasis } from '../quantity/range';
import { WHOLE_PART, type PartShare } from '../quantity/units';
import type { Constituent, ResolvedPart } from './types';

export const NOTHING = 0n as PartShare;

/** What the supplier wrote, read as a range: a typical alone is one figure, no figure at all is 0 to 100. */
export interface Stated {
	readonly of: Constituent;
	readonly low: PartShare;
	readonly high: PartShare;
	readonly typical: PartShare | null;
	readonly single: boolean;
}

export function stated(of: Constituent): Stated {
	const { low, typical, high } = of.declared;
	if (low === null && high === null && typical !== null) {
		return { of, low: typical, high: typical, typical, single: true };
	}
	const range = { low: low ?? NOTHING, high: high ?? WHOLE_PART };
	const single = range.low === range.high;
	return { of, ...range, typical: typical ?? (single ? range.low : null), single };
}

/**
 * The bound stays open ("< 1 %") only where the supplier's own figure is still the highest; a range of one point cannot be open.
 */
export const estimate = (
	part: Stated,
	range: Range<PartShare>,
	typical: bigint,
	basis: TypicalBasis
): ResolvedPart => ({
	of: part.of,
	share: {
		low: range.low,
		high: range.high,
		highOpen: range.low < range.high && (range.highOpen || (part.of.declared.highOpen && range.high === part.high)),
		typical: typical as PartShare,
		basis
	}
});
