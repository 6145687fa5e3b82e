import { type Estimate, type Range, type TypicalBasis } from '../quantity/range';
import { faulty, good, least, most, sum, WHOLE_PART, type Id, type Outcome, type PartShare } from '../quantity/units';
import { tighten } from './bounds';
import { largestRemainder } from './remainder';
import type { Constituent, MaterialFault, MaterialVersion, ResolvedMaterial, ResolvedPart } from './types';

/** Typicals may miss 100 % by at most 0.5 %: house rule, common practice, no source. */
const TOLERANCE = (WHOLE_PART / 200n) as PartShare;
const NOTHING = 0n as PartShare;

interface Stated {
	readonly of: Constituent;
	readonly low: PartShare;
	readonly high: PartShare;
	readonly typical: PartShare | null;
	readonly single: boolean;
}

/**
 * What a material may consist of, once the sum has narrowed the supplier's ranges; shares in 10⁻⁸ % of the material.
 * One figure is no range; a maximum alone starts at 0; no figure at all ("balance") lies between 0 and 100.
 * Faults say by how much a declaration contradicts itself; nothing is scaled silently (typicals within 0.5 are, and say so).
 */
export function resolveMaterial(version: MaterialVersion): Outcome<ResolvedMaterial, MaterialFault> {
	const inSum = version.constituents.filter((constituent) => constituent.place === 'inSum');
	if (inSum.length === 0) return faulty<MaterialFault>({ kind: 'noConstituents' });
	const upsideDown = version.constituents.filter(isUpsideDown);
	if (upsideDown.length > 0) {
		return { ok: false, faults: upsideDown.map(({ id }) => ({ kind: 'rangeUpsideDown', at: id })) };
	}
	const orphan = version.constituents.find((part) => part.place === 'ofWhich' && !has(version, part.parent));
	if (orphan) return faulty<MaterialFault>({ kind: 'parentUnknown', at: orphan.id });

	const raised = raiseParents(inSum.map(stated), version);
	if (!raised.ok) return raised;
	const solved = raised.value.every((part) => part.single) ? solveSingles(raised.value) : solveRanges(raised.value);
	if (!solved.ok) return solved;
	const children = resolveChildren(version, solved.value);
	if (!children.ok) return children;
	return good({ version: version.id, material: version.material, parts: [...solved.value, ...children.value] });
}

const has = (version: MaterialVersion, id: Id<'constituent'>) => version.constituents.some((part) => part.id === id);

function isUpsideDown({ declared }: Constituent): boolean {
	const low = declared.low ?? NOTHING;
	const high = declared.high ?? WHOLE_PART;
	return low > high;
}

function stated(of: Constituent): Stated {
	const { low, typical, high } = of.declared;
	if (low === null && high === null && typical !== null) {
		return { of, low: typical, high: typical, typical, single: true };
	}
	const range = { low: low ?? NOTHING, high: high ?? WHOLE_PART };
	const single = range.low === range.high;
	return { of, ...range, typical: typical ?? (single ? range.low : null), single };
}

const childrenOf = (version: MaterialVersion, parent: Id<'constituent'>) =>
	version.constituents.filter((part) => part.place === 'ofWhich' && part.parent === parent).map(stated);

/** A parent holds at least what its parts are said to hold at least. */
function raiseParents(parts: readonly Stated[], version: MaterialVersion): Outcome<readonly Stated[], MaterialFault> {
	const faults: MaterialFault[] = [];
	const raised = parts.map((part) => {
		const least = sum(childrenOf(version, part.of.id).map((child) => child.low));
		if (least > part.high) {
			faults.push({ kind: 'partsAboveParent', parent: part.of.id, by: (least - part.high) as PartShare });
		}
		return { ...part, low: part.single ? part.low : most(part.low, least) };
	});
	return faults.length > 0 ? { ok: false, faults } : good(raised);
}

/** All figures single: read as typicals; within the tolerance normalised, and then low, typical and high are one figure. */
function solveSingles(parts: readonly Stated[]): Outcome<readonly ResolvedPart[], MaterialFault> {
	const total = sum(parts.map((part) => part.low));
	const off = (total > WHOLE_PART ? total - WHOLE_PART : WHOLE_PART - total) as PartShare;
	if (off > TOLERANCE) {
		return faulty<MaterialFault>({ kind: total > WHOLE_PART ? 'minimaAbove100' : 'maximaBelow100', by: off });
	}
	const basis: TypicalBasis = off === 0n ? 'declared' : 'normalised';
	const values = largestRemainder(
		parts.map((part) => part.low * WHOLE_PART),
		total,
		WHOLE_PART
	);
	return good(parts.map((part, at) => resolved(part, exactRange(values[at] ?? 0n), values[at] ?? 0n, basis)));
}

const exactRange = (value: bigint): Range<PartShare> => ({
	low: value as PartShare,
	high: value as PartShare,
	highOpen: false
});

const resolved = (part: Stated, range: Range<PartShare>, typical: bigint, basis: TypicalBasis): ResolvedPart => ({
	of: part.of,
	share: {
		low: range.low,
		high: range.high,
		highOpen: part.of.declared.highOpen && range.high === part.high,
		typical: typical as PartShare,
		basis
	}
});

function solveRanges(parts: readonly Stated[]): Outcome<readonly ResolvedPart[], MaterialFault> {
	const lows = sum(parts.map((part) => part.low));
	const highs = sum(parts.map((part) => part.high));
	if (lows > WHOLE_PART) {
		return faulty<MaterialFault>({ kind: 'minimaAbove100', by: (lows - WHOLE_PART) as PartShare });
	}
	if (highs < WHOLE_PART) {
		return faulty<MaterialFault>({ kind: 'maximaBelow100', by: (WHOLE_PART - highs) as PartShare });
	}
	const ranges = tighten(parts);
	const outside = parts.flatMap((part, at): MaterialFault[] => {
		const range = ranges[at];
		if (!range || part.typical === null || (part.typical >= range.low && part.typical <= range.high)) return [];
		return [{ kind: 'typicalOutsideRange', at: part.of.id, range }];
	});
	if (outside.length > 0) return { ok: false, faults: outside };
	const typicals = solveTypicals(parts, ranges);
	if (!typicals.ok) return typicals;
	return good(
		parts.map((part, at) => {
			const range = ranges[at] ?? part;
			const typical = typicals.value[at] ?? { value: range.low, basis: 'derived' as const };
			return resolved(part, { ...range, highOpen: false }, typical.value, typical.basis);
		})
	);
}

interface Typical {
	readonly value: bigint;
	readonly basis: TypicalBasis;
}

/** Declared typicals stay; the others share one t in [0, 1] so that Σ(min' + t·(max' − min')) fills the 100. */
function solveTypicals(
	parts: readonly Stated[],
	ranges: readonly Range<PartShare>[]
): Outcome<readonly Typical[], MaterialFault> {
	const declared = sum(parts.map((part) => part.typical ?? NOTHING));
	const open = parts.flatMap((part, at) => (part.typical === null ? [at] : []));
	const needed = WHOLE_PART - declared;
	if (open.length === 0) return normalise(parts, ranges, needed);
	const lowest = open.reduce((total, at) => total + (ranges[at]?.low ?? 0n), 0n);
	const room = open.reduce((total, at) => total + ((ranges[at]?.high ?? 0n) - (ranges[at]?.low ?? 0n)), 0n);
	const spare = needed - lowest;
	if (spare < 0n || spare > room) {
		const by = spare < 0n ? -spare : spare - room;
		return faulty<MaterialFault>({ kind: 'typicalsOffBy', by: by as PartShare });
	}
	const den = room === 0n ? 1n : room;
	const nums = open.map((at) => {
		const range = ranges[at];
		return range ? range.low * den + (range.high - range.low) * spare : 0n;
	});
	const values = largestRemainder(nums, den, needed);
	return good(
		parts.map((part, at): Typical => {
			if (part.typical !== null) return { value: part.typical, basis: 'declared' };
			return { value: values[open.indexOf(at)] ?? 0n, basis: 'derived' };
		})
	);
}

/** All typicals declared: what they miss of 100, within the tolerance, goes to the parts by the room they have. */
function normalise(
	parts: readonly Stated[],
	ranges: readonly Range<PartShare>[],
	missing: bigint
): Outcome<readonly Typical[], MaterialFault> {
	const off = missing < 0n ? -missing : missing;
	if (off > TOLERANCE) return faulty<MaterialFault>({ kind: 'typicalsOffBy', by: off as PartShare });
	if (off === 0n) return good(parts.map((part) => ({ value: part.typical ?? 0n, basis: 'declared' })));
	const rooms = parts.map((part, at) => {
		const range = ranges[at] ?? part;
		const typical = part.typical ?? range.low;
		return missing > 0n ? range.high - typical : typical - range.low;
	});
	const room = rooms.reduce((a, b) => a + b, 0n);
	const moves = largestRemainder(
		rooms.map((each) => each * off),
		room,
		off
	);
	return good(
		parts.map((part, at): Typical => {
			const move = missing > 0n ? (moves[at] ?? 0n) : -(moves[at] ?? 0n);
			return { value: (part.typical ?? 0n) + move, basis: 'normalised' };
		})
	);
}

/** Parts of a part: each at most its parent, together at most their parent; a missing typical is the middle, marked derived. */
function resolveChildren(
	version: MaterialVersion,
	parents: readonly ResolvedPart[]
): Outcome<readonly ResolvedPart[], MaterialFault> {
	const faults: MaterialFault[] = [];
	const children = parents.flatMap((parent) => {
		const parts = childrenOf(version, parent.of.id);
		const least = sum(parts.map((part) => part.low));
		if (least > parent.share.high) {
			faults.push({ kind: 'partsAboveParent', parent: parent.of.id, by: (least - parent.share.high) as PartShare });
		}
		return parts.map((part) => resolveChild(part, parent.share, (least - part.low) as PartShare));
	});
	return faults.length > 0 ? { ok: false, faults } : good(children);
}

function resolveChild(part: Stated, parent: Estimate<PartShare>, siblings: PartShare): ResolvedPart {
	const room = most(NOTHING, (parent.high - siblings) as PartShare);
	const high = least(part.high, most(part.low, room));
	const middle = (part.low + high) / 2n;
	const declared = part.typical !== null && part.typical <= high;
	return resolved(
		part,
		{ low: part.low, high, highOpen: false },
		declared ? (part.typical ?? middle) : middle,
		declared ? 'declared' : 'derived'
	);
}
