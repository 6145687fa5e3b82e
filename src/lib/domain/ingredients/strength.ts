import type { Composition, WeighedMaterial, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import { ratio } from '../quantity/ratio';
import { WHOLE_PART, type Percent, type Ratio } from '../quantity/units';
import { hull, minkowski, reachesAbove, type Point } from './polygon';
import type { WeakPair } from './types';

export interface PlacedName {
	readonly name: string;
	readonly share: Estimate<Percent>;
	readonly select: (part: WeighedPart) => boolean;
}

/**
 * Every pair i printed before j for which some composition within the suppliers' ranges has x_j > x_i with x_j in the ordered
 * group (at or above `orderedFrom`): not only neighbours. Exact where no formula line is a range; with range lines the pairs
 * that can occur are enclosed by the hull over the corners, so that a weak pair is never missed.
 */
export function weakPairs(
	composition: Composition,
	placed: readonly PlacedName[],
	orderedFrom: bigint
): readonly WeakPair[] {
	return placed.flatMap((before, at) =>
		placed
			.slice(at + 1)
			.filter((after) => after.share.high >= orderedFrom && after.share.high > before.share.low)
			.filter((after) => canTurn(composition, before, after, orderedFrom))
			.map((after) => describe(composition, before, after))
	);
}

function canTurn(composition: Composition, before: PlacedName, after: PlacedName, orderedFrom: bigint): boolean {
	const corners = composition.weighed[0]?.corners.length ?? 0;
	const touched = composition.weighed
		.map((material) => ({ material, shape: shapeOf(material, before, after) }))
		.filter(({ shape }) => shape.length > 1 || shape.some((point) => point.x !== 0n || point.y !== 0n));
	const polygons = Array.from({ length: corners }, (_, corner) =>
		touched.reduce<readonly Point[]>(
			(sum, { material, shape }) => minkowski(sum, scaled(shape, material.corners[corner] ?? 0n)),
			[{ x: 0n, y: 0n }]
		)
	);
	return reachesAbove(hull(polygons.flat()), orderedFrom);
}

const scaled = (shape: readonly Point[], by: bigint) => shape.map((point) => ({ x: point.x * by, y: point.y * by }));

/** The pairs (share of the one, share of the other) within one material: box ∩ strip, then the parts of parts. */
function shapeOf(material: WeighedMaterial, before: PlacedName, after: PlacedName): readonly Point[] {
	const inSum = material.parts.filter((part) => part.role !== 'ofWhich');
	const mine = span(inSum.filter(before.select));
	const theirs = span(inSum.filter((part) => after.select(part) && !before.select(part)));
	const rest = span(inSum.filter((part) => !before.select(part) && !after.select(part)));
	const box = boxAndStrip(mine, theirs, { low: WHOLE_PART - rest.high, high: WHOLE_PART - rest.low });
	const inside = material.parts.filter((part) => part.role === 'ofWhich');
	// A part of the name before never outweighs it: counted with its parent, it only adds to both.
	const own = new Set(inSum.filter(before.select).map((part) => part.constituent));
	const free = inside.filter((part) => part.parent === null || !own.has(part.parent));
	return minkowski(box, segment(span(free.filter(before.select)), span(free.filter(after.select))));
}

interface Span {
	readonly low: bigint;
	readonly high: bigint;
}
const span = (parts: readonly WeighedPart[]): Span =>
	parts.reduce<Span>((sum, { share }) => ({ low: sum.low + share.low, high: sum.high + share.high }), {
		low: 0n,
		high: 0n
	});

const segment = (x: Span, y: Span): readonly Point[] =>
	hull([
		{ x: x.low, y: y.low },
		{ x: x.low, y: y.high },
		{ x: x.high, y: y.low },
		{ x: x.high, y: y.high }
	]);

/** Corners of {x in its span, y in its span, x + y within the strip}. */
function boxAndStrip(x: Span, y: Span, strip: Span): readonly Point[] {
	const within = ({ x: a, y: b }: Point) =>
		a >= x.low && a <= x.high && b >= y.low && b <= y.high && a + b >= strip.low && a + b <= strip.high;
	const corners: Point[] = [x.low, x.high].flatMap((a) => [y.low, y.high].map((b) => ({ x: a, y: b })));
	const onStrip = [strip.low, strip.high].flatMap((total): Point[] => [
		{ x: x.low, y: total - x.low },
		{ x: x.high, y: total - x.high },
		{ x: total - y.low, y: y.low },
		{ x: total - y.high, y: y.high }
	]);
	return hull([...corners, ...onStrip].filter(within));
}

interface WidestPart {
	readonly material: WeighedMaterial;
	readonly part: WeighedPart;
	readonly width: bigint;
}

/** The selected constituent whose range moves the formula most: weight × width. */
export function widest(composition: Composition, select: (part: WeighedPart) => boolean): WidestPart | null {
	let found: WidestPart | null = null;
	for (const material of composition.weighed) {
		for (const part of material.parts.filter(select)) {
			const width = material.typicalWeight * (part.share.high - part.share.low);
			if (width > (found?.width ?? 0n)) found = { material, part, width };
		}
	}
	return found;
}

function describe(composition: Composition, before: PlacedName, after: PlacedName): WeakPair {
	const settling = widest(composition, (part) => before.select(part) || after.select(part));
	const derived = before.share.basis === 'derived' || after.share.basis === 'derived';
	const equal = before.share.typical === after.share.typical;
	const at = settling && turningPoint(settling, before, after);
	return {
		before: before.name,
		after: after.name,
		strength: derived || equal ? 'undecided' : 'restsOnTypical',
		turnsAt:
			settling && at
				? {
						material: settling.material.material,
						constituent: settling.part.constituent,
						substance: settling.part.substance,
						at
					}
				: null,
		ask: settling?.material.material ?? null
	};
}

/** The constituent's share of its material at which the two weigh the same, all else at its typical; null outside its range. */
function turningPoint({ material, part }: WidestPart, before: PlacedName, after: PlacedName): Ratio | null {
	if (material.typicalWeight === 0n) return null;
	const gap = before.share.typical - after.share.typical;
	const direction = after.select(part) ? 1n : -1n;
	const at = ratio(part.share.typical * material.typicalWeight + direction * gap, material.typicalWeight);
	const inside = at.num >= part.share.low * at.den && at.num <= part.share.high * at.den;
	return inside ? at : null;
}
