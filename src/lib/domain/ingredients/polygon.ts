import { compare } from '../quantity/units';

/** A point (share of the name printed before, share of the name printed after), exact. */
export interface Point {
	readonly x: bigint;
	readonly y: bigint;
}

const cross = (o: Point, a: Point, b: Point) => (a.x - o.x) * (b.y - o.y) - (a.y - o.y) * (b.x - o.x);

/** Convex hull, counter-clockwise, without repeated or collinear points (monotone chain). */
export function hull(points: readonly Point[]): readonly Point[] {
	const sorted = [...points].sort((a, b) => compare(a.x, b.x) || compare(a.y, b.y));
	const distinct = sorted.filter(
		(point, at) => at === 0 || point.x !== sorted[at - 1]?.x || point.y !== sorted[at - 1]?.y
	);
	if (distinct.length <= 2) return distinct;
	const lower = chain(distinct);
	const upper = chain([...distinct].reverse());
	return [...lower.slice(0, -1), ...upper.slice(0, -1)];
}

function chain(points: readonly Point[]): Point[] {
	const kept: Point[] = [];
	for (const point of points) {
		while (kept.length >= 2) {
			const [before, last] = kept.slice(-2) as [Point, Point];
			if (cross(before, last, point) > 0n) break;
			kept.pop();
		}
		kept.push(point);
	}
	return kept;
}

/** Every sum of a point of one and a point of the other; convex when both are. */
export const minkowski = (a: readonly Point[], b: readonly Point[]): readonly Point[] =>
	hull(a.flatMap((p) => b.map((q) => ({ x: p.x + q.x, y: p.y + q.y }))));

/** Whether the convex polygon holds a point with y > x and y ≥ from (or y > from, when strict). */
export function reachesAbove(
	polygon: readonly Point[],
	{ from: least, strict }: { readonly from: bigint; readonly strict: boolean }
): boolean {
	// Where some point lies above `from`, one that only touches it and has y > x has others just above it.
	if (strict && !polygon.some((point) => point.y > least)) return false;
	if (polygon.some((point) => point.y >= least && point.y > point.x)) return true;
	return polygon.some((from, at) => {
		const to = polygon[(at + 1) % polygon.length];
		if (!to || from.y >= least === to.y >= least) return false;
		// On the edge at height `least`: x = from.x + (to.x − from.x)·(least − from.y)/(to.y − from.y), compared without division.
		const rise = to.y - from.y;
		const run = (to.x - from.x) * (least - from.y);
		return rise > 0n ? least * rise > from.x * rise + run : least * rise < from.x * rise + run;
	});
}
