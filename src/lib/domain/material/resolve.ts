import type { Range, TypicalBasis } from '../quantity/range';
import { faulty, good, most, sum, WHOLE_PART, type Id, type Outcome, type PartShare } from '../quantity/units';
import { tighten } from './bounds';
import { partsOf, resolveParts } from './parts';
import { largestRemainder } from './remainder';
import { estimate, NOTHING, stated, type Stated } from './stated';
import type { Constituent, MaterialFault, MaterialVersion, ResolvedMaterial, ResolvedPart } from './types';

/** Typicals may miss 100 % by at most 0.5 %: house rule, common practice, no source. */
const TOLERANCE = (WHOLE_PART / 200n) as PartShare;

/**
 * What a material may consist of, once the sum has narrowed the supplier's ranges; shares in 10⁻⁸ % of the material.
 * One figure is no range; a maximum alone starts at 0; no figure at all ("balance") lies between 0 and 100.
 * Two rows of one substance stay two rows (their roles and sources may differ); whoever adds them takes both, jointly bounded,
 * which gives the same figures as merging them first.
 * Faults say by how much a declaration contradicts itself; nothing is scaled silently (typicals within 0.5 are, and say so).
 */
export function resolveMaterial(version: MaterialVersion): Outcome<ResolvedMaterial, MaterialFault> {
	const inSum = version.constituents.filter((constituent) => constituent.place === 'inSum');
	if (inSum.length === 0) return faulty<MaterialFault>({ kind: 'noConstituents' });
	const upsideDown = version.constituents.filter(isUpsideDown);
	if (upsideDown.length > 0) {
		return { ok: false, faults: upsideDown.map(({ id }) => ({ kind: 'rangeUpsideDown', at: id })) };
	}
	const astray = version.constituents.flatMap(typicalAstray);
	if (astray.length > 0) return { ok: false, faults: astray };
	const orphan = version.constituents.find((part) => part.place === 'ofWhich' && !holds(inSum, part.parent));
	if (orphan) return faulty<MaterialFault>({ kind: 'parentUnknown', at: orphan.id });

	const raised = raiseParents(inSum.map(stated), version);
	if (!raised.ok) return raised;
	const solved = raised.value.every((part) => part.single) ? solveSingles(raised.value) : solveRanges(raised.value);
	if (!solved.ok) return solved;
	const children = resolveParts(version, solved.value);
	if (!children.ok) return children;
	return good({ version: version.id, material: version.material, parts: [...solved.value, ...children.value] });
}

/** Only what stands in the sum can hold parts: a part of a part has no share of its own to be measured against. */
const holds = (inSum: readonly Constituent[], id: Id<'constituent'>) => inSum.some((part) => part.id === id);

function isUpsideDown({ declared }: Constituent): boolean {
	const low = declared.low ?? NOTHING;
	const high = declared.high ?? WHOLE_PART;
	return low > high;
}

/** A typical outside the very range that it was declared with. */
function typicalAstray({ id, declared }: Constituent): MaterialFault[] {
	const { typical } = declared;
	const low = declared.low ?? NOTHING;
	const high = declared.high ?? WHOLE_PART;
	if (typical === null || (typical >= low && typical <= high)) return [];
	return [{ kind: 'typicalOutsideRange', at: id, range: { low, high, highOpen: declared.highOpen } }];
}

/** A parent holds at least what its parts are said to hold at least. */
function raiseParents(parts: readonly Stated[], version: MaterialVersion): Outcome<readonly Stated[], MaterialFault> {
	const faults: MaterialFault[] = [];
	const raised = parts.map((part) => {
		const least = sum(partsOf(version, part.of.id).map((child) => child.low));
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
	return good(parts.map((part, at) => estimate(part, exactRange(values[at] ?? 0n), values[at] ?? 0n, basis)));
}

const exactRange = (value: bigint): Range<PartShare> => ({
	low: value as PartShare,
	high: value as PartShare,
	highOpen: false
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
			const range = ranges[at] ?? exactRange(part.low);
			const typical = typicals.value[at] ?? { value: range.low, basis: 'derived' as const };
			return estimate(part, range, typical.value, typical.basis);
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
