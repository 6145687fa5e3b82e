import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PartShare } from '../quantity/units';
import { jointBounds, tighten, type Box } from './bounds';

interface Weighted extends Box {
	readonly k: bigint;
}
const small = fc.tuple(fc.integer({ min: 0, max: 6 }), fc.integer({ min: 0, max: 6 }), fc.integer({ min: -3, max: 3 }));
const boxes = fc.array(small, { minLength: 1, maxLength: 4 }).map((all) =>
	all.map(([low, width, k]): Weighted => ({
		low: BigInt(low) as PartShare,
		high: BigInt(low + width) as PartShare,
		k: BigInt(k)
	}))
);
const whole = fc.integer({ min: 0, max: 20 }).map((value) => BigInt(value) as PartShare);

/** Every whole-numbered composition within the boxes that sums to the whole. */
function compositions(parts: readonly Box[], total: bigint): bigint[][] {
	const [first, ...rest] = parts;
	if (!first) return total === 0n ? [[]] : [];
	const found: bigint[][] = [];
	for (let x: bigint = first.low; x <= first.high; x += 1n) {
		found.push(...compositions(rest, total - x).map((tail) => [x, ...tail]));
	}
	return found;
}
const order = (a: bigint, b: bigint) => (a < b ? -1 : a > b ? 1 : 0);

describe('jointBounds', () => {
	// A linear function over a box cut by a sum takes its extremes at whole-numbered corners, so that counting through is exact.
	test('equal the extremes over every composition, and null when there is none', () => {
		fc.assert(
			fc.property(boxes, whole, (parts, total) => {
				const values = compositions(parts, total).map((xs) =>
					xs.reduce((sum, x, at) => sum + x * (parts[at]?.k ?? 0n), 0n)
				);
				const bounds = jointBounds(parts, (part) => part.k, total);
				const sorted = values.sort(order);
				expect(bounds).toEqual(values.length === 0 ? null : { low: sorted[0], high: sorted.at(-1) });
			})
		);
	});
	test('the order of the constituents does not matter', () => {
		fc.assert(
			fc.property(boxes, whole, (parts, total) => {
				expect(jointBounds([...parts].reverse(), (part) => part.k, total)).toEqual(
					jointBounds(parts, (part) => part.k, total)
				);
			})
		);
	});
	test('two maxima of one material do not occur together', () => {
		const half = { low: 40n as PartShare, high: 60n as PartShare };
		expect(jointBounds([half, half], () => 1n, 100n as PartShare)).toEqual({ low: 100n, high: 100n });
	});
});

describe('tighten', () => {
	test('gives the exact extremes of every single constituent', () => {
		fc.assert(
			fc.property(boxes, whole, (parts, total) => {
				const all = compositions(parts, total);
				if (all.length === 0) return;
				const ranges = tighten(parts, total);
				parts.forEach((_, at) => {
					const values = all.map((xs) => xs[at] ?? 0n).sort(order);
					expect(ranges[at]).toEqual({ low: values[0], high: values.at(-1), highOpen: false });
				});
			})
		);
	});
});
