import type { Composition, WeighedMaterial, WeighedPart } from '../composition/types';
import { compareRatios, ratio } from '../quantity/ratio';
import { compare, most, type Ratio } from '../quantity/units';
import type { PlacedName, WeakPair } from './types';

export interface Span {
	readonly low: bigint;
	readonly high: bigint;
}
export interface RangedPart {
	readonly material: WeighedMaterial;
	readonly part: WeighedPart;
	readonly width: bigint;
}
/** A placed name with what it holds of each material, worked out once for all its pairs. */
export interface Stake extends PlacedName {
	readonly held: ReadonlyMap<WeighedMaterial, Span>;
	/** Lowest and highest share of the formula at every corner of the range lines. */
	readonly ends: readonly Span[];
	readonly ranged: readonly RangedPart[];
}

/** What a supplier left open, with how far each moves the formula: weight × width. */
export const rangedParts = (material: WeighedMaterial, parts: readonly WeighedPart[]): readonly RangedPart[] =>
	parts
		.map((part) => ({ material, part, width: material.typicalWeight * (part.share.high - part.share.low) }))
		.filter(({ width }) => width > 0n);

const widestFirst = (parts: readonly RangedPart[]) => [...parts].sort((a, b) => compare(b.width, a.width));

/** The material whose narrower range would settle most of the selected amount. */
export const widest = (composition: Composition, select: (part: WeighedPart) => boolean) =>
	widestFirst(composition.weighed.flatMap((material) => rangedParts(material, material.parts.filter(select))))[0]
		?.material.material ?? null;

/**
 * How firmly a weak pair stands, the supplier's figure at which it turns, and the material to ask about: the widest range at
 * which it turns, all else at its typical; the widest range where no single one turns it.
 */
export function describe(before: Stake, after: Stake, orderedFrom: bigint): WeakPair {
	const candidates = widestFirst([...before.ranged, ...after.ranged]);
	const turns = candidates.flatMap((candidate) => {
		const at = turningPoint(candidate, before, after, orderedFrom);
		return at ? [{ candidate, at }] : [];
	});
	const [turn] = turns;
	const derived = before.share.basis === 'derived' || after.share.basis === 'derived';
	const equal = before.share.typical === after.share.typical;
	return {
		before: before.name,
		after: after.name,
		strength: derived || equal ? 'undecided' : 'restsOnTypical',
		turnsAt: turn
			? {
					material: turn.candidate.material.material,
					constituent: turn.candidate.part.constituent,
					substance: turn.candidate.part.substance,
					at: turn.at
				}
			: null,
		ask: (turn?.candidate ?? candidates[0])?.material.material ?? null
	};
}

/**
 * The constituent's share of its material (in 10⁻⁸ %) at which the two weigh the same and the second is in the ordered group;
 * null outside its range. Where only the other name can make room in the material, what the one gains the other loses.
 */
function turningPoint(
	{ material, part }: RangedPart,
	before: PlacedName,
	after: PlacedName,
	orderedFrom: bigint
): Ratio | null {
	const weight = material.typicalWeight;
	const rises = after.select(part);
	const exchange = isExchange(material, part, rises ? before : after);
	const gap = before.share.typical - after.share.typical;
	const missing = orderedFrom - after.share.typical;
	if (!rises && !exchange && missing > 0n) return null;
	const twice = exchange ? most(gap, missing * 2n) : most(gap, rises ? missing : gap) * 2n;
	const at = ratio(part.share.typical * weight * 2n + (rises ? twice : -twice), weight * 2n);
	const outside = compareRatios(at, ratio(part.share.low, 1n)) < 0 || compareRatios(at, ratio(part.share.high, 1n)) > 0;
	return outside ? null : at;
}

function isExchange(material: WeighedMaterial, part: WeighedPart, other: PlacedName): boolean {
	if (part.role === 'ofWhich') return false;
	const rest = material.parts.filter(
		(each) => each !== part && each.role !== 'ofWhich' && each.share.low < each.share.high
	);
	return rest.length > 0 && rest.every(other.select);
}
