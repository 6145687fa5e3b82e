import { fractionOf } from '../composition/amounts';
import type { Composition, WeighedMaterial, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import { least, most, WHOLE_PART, type Percent } from '../quantity/units';
import { hull, minkowski, reachesAbove, type Point } from './polygon';
import { describe, rangedParts, type RangedPart, type Span, type Stake } from './turning';
import type { PlacedName, WeakPair } from './types';

/** The shares that a market orders by weight: at least `from`, or only more than it. */
export interface OrderedGroup {
	readonly from: bigint;
	readonly strict: boolean;
}

const NONE: Span = { low: 0n, high: 0n };

/**
 * Every pair i printed before j for which some composition within the suppliers' ranges has x_j > x_i with x_j in the ordered
 * group: not only neighbours. Exact for what stands in the sum of its material; range lines and
 * parts of parts that several names share are enclosed by a hull, so that a weak pair is never missed.
 */
export function weakPairs(
	composition: Composition,
	placed: readonly PlacedName[],
	group: OrderedGroup
): readonly WeakPair[] {
	// Most names of most formulas have one figure: what they hold is worked out only where a pair could turn at all.
	const known = new Map<PlacedName, Stake>();
	const stake = (name: PlacedName): Stake => {
		const made = known.get(name) ?? stakeOf(composition, name);
		known.set(name, made);
		return made;
	};
	return placed.flatMap((before, at) =>
		placed
			.slice(at + 1)
			.filter(({ share }) => share.high > before.share.low && canBeOrdered(share, group))
			.filter((after) => canTurn(stake(before), stake(after), group))
			.map((after) => describe(stake(before), stake(after), group.from))
	);
}

/** "< 1 %" stays below 1 %: an open bound that only just reaches the group never enters it. */
const canBeOrdered = (share: Estimate<Percent>, { from, strict }: OrderedGroup) =>
	share.high > from || (!strict && share.high === from && !share.highOpen);

function stakeOf(composition: Composition, name: PlacedName): Stake {
	const held = new Map<WeighedMaterial, Span>();
	const ranged: RangedPart[] = [];
	for (const material of name.within?.get(composition) ?? composition.weighed) {
		const parts = material.parts.filter(name.select);
		if (parts.length === 0) continue;
		held.set(material, fractionOf(material, name.select));
		ranged.push(...rangedParts(material, parts));
	}
	const count = composition.weighed[0]?.corners.length ?? 0;
	const ends = Array.from({ length: count }, (_, corner) => spanAt([...held.keys()], held, corner));
	return { ...name, held, ends, ranged };
}

const spanAt = (
	materials: readonly WeighedMaterial[],
	held: ReadonlyMap<WeighedMaterial, Span>,
	corner: number
): Span =>
	materials.reduce<Span>(({ low, high }, material) => {
		const weight = material.corners[corner] ?? 0n;
		const span = held.get(material) ?? NONE;
		return { low: low + weight * span.low, high: high + weight * span.high };
	}, NONE);

/** Materials in which both names can vary; everywhere else the one does not depend on the other. */
const sharedBy = (before: Stake, after: Stake): readonly WeighedMaterial[] =>
	[...before.held]
		.filter(([material, span]) => varies(span) && varies(after.held.get(material) ?? NONE))
		.map(([material]) => material);
const varies = ({ low, high }: Span) => low < high;

function canTurn(before: Stake, after: Stake, group: OrderedGroup): boolean {
	const shared = sharedBy(before, after);
	if (shared.length === 0 && before.ends.length === 1) return cornerTurns(before, after, group);
	const shapes = new Map(shared.map((material) => [material, shapeOf(material, before, after)]));
	const outlines: (readonly Point[])[] = [];
	for (const [corner, x] of before.ends.entries()) {
		const y = after.ends[corner] ?? NONE;
		const apart = boxOf(
			without(x, spanAt(shared, before.held, corner)),
			without(y, spanAt(shared, after.held, corner))
		);
		const outline = shared.reduce<readonly Point[]>(
			(sum, material) => minkowski(sum, scaled(shapes.get(material) ?? [], material.corners[corner] ?? 0n)),
			apart
		);
		if (reachesAbove(outline, group)) return true;
		outlines.push(outline);
	}
	return before.ends.length > 1 && reachesBetween(outlines, group);
}

/** Where the two vary independently, the least of the one and the most of the other stand at one corner. */
function cornerTurns(before: Stake, after: Stake, { from, strict }: OrderedGroup): boolean {
	const [x, y] = [before.ends[0] ?? NONE, after.ends[0] ?? NONE];
	return y.high > x.low && (y.high > from || (!strict && y.high === from));
}

/** Between the corners of range lines: only where some corner is ordered and another one turned can a mixture be both. */
function reachesBetween(outlines: readonly (readonly Point[])[], group: OrderedGroup): boolean {
	const points = outlines.flat();
	if (!points.some(({ y }) => y >= group.from) || !points.some(({ x, y }) => y > x)) return false;
	return reachesAbove(hull(points), group);
}

const without = (all: Span, part: Span): Span => ({ low: all.low - part.low, high: all.high - part.high });
const boxOf = (x: Span, y: Span): readonly Point[] =>
	hull([x.low, x.high].flatMap((a) => [y.low, y.high].map((b) => ({ x: a, y: b }))));
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
