import type { Composition, WeighedMaterial, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import { least, most, WHOLE_PART, type Percent } from '../quantity/units';
import { hull, minkowski, reachesAbove, type Point } from './polygon';
import { describe } from './turning';
import type { PlacedName, WeakPair } from './types';

/**
 * Every pair i printed before j for which some composition within the suppliers' ranges has x_j > x_i with x_j in the ordered
 * group (at or above `orderedFrom`): not only neighbours. Exact for what stands in the sum of its material; range lines and
 * parts of parts that several names share are enclosed by a hull, so that a weak pair is never missed.
 */
export function weakPairs(
	composition: Composition,
	placed: readonly PlacedName[],
	orderedFrom: bigint
): readonly WeakPair[] {
	return placed.flatMap((before, at) =>
		placed
			.slice(at + 1)
			.filter(({ share }) => canBeOrdered(share, orderedFrom) && share.high > before.share.low)
			.filter((after) => canTurn(composition, before, after, orderedFrom))
			.map((after) => describe(composition, before, after, orderedFrom))
	);
}

/** "< 1 %" stays below 1 %: an open bound that only just reaches the group never enters it. */
const canBeOrdered = (share: Estimate<Percent>, orderedFrom: bigint) =>
	share.high > orderedFrom || (share.high === orderedFrom && !share.highOpen);

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
	return inSum.reduce<readonly Point[]>((shape, parent) => {
		const children = material.parts.filter((part) => part.parent === parent.constituent);
		if (children.length === 0) return shape;
		if (before.select(parent)) return lifted(shape, parent, children, mine, after);
		return minkowski(shape, family(parent, children, before, after));
	}, box);
}

/** Parts of a parent that is not the name before: in their ranges, and together within the parent. */
function family(
	parent: WeighedPart,
	children: readonly WeighedPart[],
	before: PlacedName,
	after: PlacedName
): readonly Point[] {
	const mine = children.filter(before.select);
	const theirs = after.select(parent) ? [] : children.filter((part) => after.select(part) && !before.select(part));
	const others = span(children.filter((part) => !mine.includes(part) && !theirs.includes(part)));
	return boxAndStrip(span(mine), span(theirs), { low: 0n, high: parent.share.high - others.low });
}

/** The name after as a part of the name before: never more than its parent holds. */
function lifted(
	shape: readonly Point[],
	parent: WeighedPart,
	children: readonly WeighedPart[],
	mine: Span,
	after: PlacedName
): readonly Point[] {
	if (after.select(parent)) return shape;
	const theirs = span(children.filter(after.select));
	const others = span(children.filter((part) => !after.select(part)));
	// x is the parent alone, or holds more beside it; then the parent is enclosed by its own highest.
	const alone = mine.low === parent.share.low && mine.high === parent.share.high;
	const room = (x: bigint) => least(theirs.high, (alone ? x : parent.share.high) - others.low);
	const bend = theirs.high + others.low;
	return hull(
		[...shape, ...pointsAt(shape, bend)].flatMap(({ x, y }) => [
			{ x, y: y + theirs.low },
			{ x, y: y + most(theirs.low, room(x)) }
		])
	);
}

/** Where the outline crosses a given x; whole, as every side is level, upright or falls one for one. */
const pointsAt = (shape: readonly Point[], x: bigint): readonly Point[] =>
	shape.flatMap((from, at) => {
		const to = shape[(at + 1) % shape.length];
		if (!to || from.x < x === to.x < x || to.x === from.x) return [];
		return [{ x, y: from.y + ((to.y - from.y) * (x - from.x)) / (to.x - from.x) }];
	});

interface Span {
	readonly low: bigint;
	readonly high: bigint;
}
const span = (parts: readonly WeighedPart[]): Span =>
	parts.reduce<Span>((sum, { share }) => ({ low: sum.low + share.low, high: sum.high + share.high }), {
		low: 0n,
		high: 0n
	});

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
