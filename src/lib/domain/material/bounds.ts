import type { Range } from '../quantity/range';
import { compare, least, sum, WHOLE_PART, type PartShare } from '../quantity/units';

export interface Box {
	readonly low: PartShare;
	readonly high: PartShare;
}

/**
 * Lowest and highest value of Σ k·x over {low ≤ x ≤ high, Σ x = 100 %}, exactly; null when the set is empty.
 * All start at their low; the rest of the 100 goes to the constituents in the order of their coefficient (greedy fill).
 * Adding single maxima of one material would be wrong: they cannot occur together.
 */
export function jointBounds<P extends Box>(
	parts: readonly P[],
	coefficient: (part: P) => bigint,
	whole: PartShare = WHOLE_PART
): { readonly low: bigint; readonly high: bigint } | null {
	const spare = whole - sum(parts.map((part) => part.low));
	const room = parts.reduce((total, part) => total + (part.high - part.low), 0n);
	if (spare < 0n || spare > room) return null;
	const ascending = [...parts].sort((a, b) => compare(coefficient(a), coefficient(b)));
	return {
		low: fill(ascending, coefficient, spare),
		high: fill([...ascending].reverse(), coefficient, spare)
	};
}

function fill<P extends Box>(ordered: readonly P[], coefficient: (part: P) => bigint, spare: bigint): bigint {
	let left = spare;
	let total = 0n;
	for (const part of ordered) {
		const taken = least(left, part.high - part.low);
		total += coefficient(part) * (part.low + taken);
		left -= taken;
	}
	return total;
}

/** The exact feasible interval of each part under the sum; the parts must be feasible together. */
export function tighten<P extends Box>(
	parts: readonly P[],
	whole: PartShare = WHOLE_PART
): readonly Range<PartShare>[] {
	const lows = sum(parts.map((part) => part.low));
	const highs = sum(parts.map((part) => part.high));
	return parts.map((part) => {
		const low = whole - (highs - part.high);
		const high = whole - (lows - part.low);
		return {
			low: (low > part.low ? low : part.low) as PartShare,
			high: (high < part.high ? high : part.high) as PartShare,
			highOpen: false
		};
	});
}
