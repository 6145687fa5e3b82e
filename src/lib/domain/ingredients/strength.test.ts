import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Composition, WeighedMaterial } from '../composition/types';
import { amountOf } from '../composition/amounts';
import { formatRatio } from '../quantity/ratio';
import { composed, type Formulas, type Materials, type Part } from '../testing/formula';
import { weakPairs } from './strength';
import type { PlacedName } from './types';

const atLeast = (from: bigint) => ({ from, strict: false });

/** In the given order, each name standing for its substance. */
const placedIn = (composition: Composition, names: readonly string[]): PlacedName[] =>
	names.map((name) => {
		const select: PlacedName['select'] = (part) => part.substance === name.toLowerCase();
		return { name, select, share: amountOf(composition.weighed, select) };
	});
const onePercent = (composition: Composition) => 10n ** BigInt(composition.shareDecimals);
function weak(materials: Materials, formulas: Formulas, names: readonly string[]) {
	const composition = composed(materials, formulas);
	return weakPairs(composition, placedIn(composition, names), atLeast(onePercent(composition)));
}
const pure = (inci: string): Part[] => [{ inci, typical: '100' }];
const turn = (pair: ReturnType<typeof weak>[number] | undefined) =>
	pair?.turnsAt && formatRatio(pair.turnsAt.at, 8, 0, 'nearest');

describe('weak pairs', () => {
	const water = pure('Aqua');
	test('are found beyond neighbours', () => {
		const materials = {
			water,
			a: pure('A'),
			b: pure('B'),
			mix: [{ inci: 'C', min: '10', max: '90' }, { inci: 'Aqua' }]
		};
		const lines = [
			{ material: 'a', percent: '8' },
			{ material: 'b', percent: '6' },
			{ material: 'mix', percent: '10' },
			{ material: 'water', qs: true }
		];
		const pairs = weak(materials, { F: lines }, ['Aqua', 'A', 'B', 'C']);
		expect(pairs.map(({ before, after }) => [before, after])).toEqual([
			['A', 'C'],
			['B', 'C']
		]);
		expect(pairs.map(turn)).toEqual(['80', '60']);
	});
	test('below 1 % any order is lawful, so that nothing there is weak', () => {
		const materials = { water, a: pure('A'), mix: [{ inci: 'C', min: '0', max: '99' }, { inci: 'Aqua' }] };
		const formula = (mix: string) => ({
			F: [
				{ material: 'a', percent: '0.6' },
				{ material: 'mix', percent: mix },
				{ material: 'water', qs: true }
			]
		});
		expect(weak(materials, formula('1'), ['Aqua', 'A', 'C'])).toEqual([]);
		const [pair] = weak(materials, formula('1.1'), ['Aqua', 'A', 'C']);
		expect(pair).toMatchObject({ before: 'A', after: 'C', ask: 'mix' });
		expect(pair?.turnsAt && formatRatio(pair.turnsAt.at, 8, 2, 'up')).toBe('90.91');
	});
	test('"less than" never reaches the ordered group that its bound only touches', () => {
		const materials = (open: boolean): Materials => ({
			water,
			a: pure('A'),
			mix: [{ inci: 'C', max: '50', open }, { inci: 'Aqua' }]
		});
		const formulas = {
			F: [
				{ material: 'a', percent: '0.9' },
				{ material: 'mix', percent: '2' },
				{ material: 'water', qs: true }
			]
		};
		expect(weak(materials(true), formulas, ['Aqua', 'A', 'C'])).toEqual([]);
		expect(weak(materials(false), formulas, ['Aqua', 'A', 'C'])).toHaveLength(1);
	});
	test('within one material what the one gains the other loses: it turns in the middle', () => {
		const materials = {
			mix: [
				{ inci: 'A', min: '40', typical: '52', max: '60' },
				{ inci: 'B', min: '40', typical: '48', max: '60' }
			]
		};
		const [pair, ...more] = weak(materials, { F: [{ material: 'mix', percent: '100' }] }, ['A', 'B']);
		expect(more).toEqual([]);
		expect(pair).toMatchObject({ before: 'A', after: 'B', strength: 'restsOnTypical' });
		expect(turn(pair)).toBe('50');
	});
	test('equal typical values are undecided even when they are declared', () => {
		const materials = {
			a: pure('A'),
			mix: [
				{ inci: 'B', min: '40', typical: '50', max: '60' },
				{ inci: 'C', min: '40', typical: '50', max: '60' }
			]
		};
		const pairs = weak(
			materials,
			{
				F: [
					{ material: 'a', percent: '50' },
					{ material: 'mix', percent: '50' }
				]
			},
			['A', 'B', 'C']
		);
		expect(pairs).toMatchObject([{ before: 'B', after: 'C', strength: 'undecided' }]);
	});
	test('a range line turns an order too; no supplier can settle that', () => {
		const materials = { water, a: pure('A'), b: pure('B') };
		const lines = (max: string) => ({
			F: [
				{ material: 'a', percent: '4' },
				{ material: 'b', percent: '3', max },
				{ material: 'water', qs: true }
			]
		});
		expect(weak(materials, lines('4'), ['Aqua', 'A', 'B'])).toEqual([]);
		expect(weak(materials, lines('5'), ['Aqua', 'A', 'B'])).toEqual([
			{ before: 'A', after: 'B', strength: 'restsOnTypical', turnsAt: null, ask: null }
		]);
	});
	test('a perfume is never outweighed by an allergen inside it', () => {
		const perfume: Part[] = [
			{ inci: 'Parfum', min: '40', max: '90' },
			{ inci: 'Alcohol' },
			{ inci: 'Linalool', max: '80', ofWhich: 'Parfum' }
		];
		const formulas = {
			F: [
				{ material: 'perfume', percent: '20' },
				{ material: 'water', qs: true }
			]
		};
		const pairs = weak({ water, perfume }, formulas, ['Aqua', 'Parfum', 'Linalool']);
		expect(pairs).toEqual([]);
	});
	test('but it is when more of the allergen comes from elsewhere', () => {
		const perfume: Part[] = [
			{ inci: 'Parfum', min: '40', max: '90' },
			{ inci: 'Alcohol' },
			{ inci: 'Linalool', max: '80', ofWhich: 'Parfum' }
		];
		const formulas = {
			F: [
				{ material: 'perfume', percent: '20' },
				{ material: 'direct', percent: '1' },
				{ material: 'water', qs: true }
			]
		};
		const pairs = weak({ water, perfume, direct: pure('Linalool') }, formulas, ['Aqua', 'Parfum', 'Linalool']);
		expect(pairs).toMatchObject([{ before: 'Parfum', after: 'Linalool' }]);
	});
});

// An independent check: every whole-numbered composition of every material, combined, and every segment between two of them.
const UNIT = 1_000_000_000n;
const LIMIT_PERCENT = 20n;
const ranges = fc
	.array(fc.tuple(fc.integer({ min: 0, max: 5 }), fc.integer({ min: 0, max: 6 })), { minLength: 3, maxLength: 3 })
	.map((all) =>
		all.map(([low, extra], at): Part => ({
			inci: 'ABC'[at] ?? '',
			min: `${low * 10}`,
			max: `${Math.min(10, low + extra) * 10}`
		}))
	)
	.filter((parts) => {
		const total = (end: 'min' | 'max') => parts.reduce((sum, part) => sum + BigInt(part[end] ?? 0), 0n);
		return total('min') <= 100n && total('max') >= 100n;
	});

function corners({ parts }: WeighedMaterial): Record<string, bigint>[] {
	const lists = parts.reduce<bigint[][]>(
		(all, { share }) => {
			const values = Array.from({ length: 11 }, (_, at) => BigInt(at) * UNIT).filter(
				(x) => x >= share.low && x <= share.high
			);
			return all.flatMap((list) => values.map((x) => [...list, x]));
		},
		[[]]
	);
	return lists
		.filter((list) => list.reduce((sum, x) => sum + x, 0n) === 10n * UNIT)
		.map((list) => Object.fromEntries(list.map((x, at) => [parts[at]?.substance ?? '', x])));
}

function turnsSomewhere(composition: Composition, before: string, after: string, least: bigint): boolean {
	const points = composition.weighed.reduce<{ x: bigint; y: bigint }[]>(
		(sums, material) =>
			sums.flatMap(({ x, y }) =>
				corners(material).map((values) => ({
					x: x + material.typicalWeight * (values[before] ?? 0n),
					y: y + material.typicalWeight * (values[after] ?? 0n)
				}))
			),
		[{ x: 0n, y: 0n }]
	);
	const distinct = [...new Map(points.map((point) => [`${point.x},${point.y}`, point])).values()];
	if (distinct.some(({ x, y }) => y >= least && y > x)) return true;
	return distinct.some((p) =>
		distinct.some(
			(q) => p.y > least && q.y < least && least * (p.y - q.y) > q.x * (p.y - q.y) + (p.x - q.x) * (least - q.y)
		)
	);
}

test('a pair is weak exactly when some composition turns it', () => {
	fc.assert(
		fc.property(ranges, ranges, fc.integer({ min: 10, max: 90 }), (one, two, weight) => {
			const composition = composed(
				{ one, two },
				{
					F: [
						{ material: 'one', percent: `${weight}` },
						{ material: 'two', percent: `${100 - weight}` }
					]
				}
			);
			const least = LIMIT_PERCENT * onePercent(composition);
			const names = ['A', 'B', 'C'];
			const found = weakPairs(composition, placedIn(composition, names), atLeast(least)).map(
				({ before, after }) => before + after
			);
			const expected = ['AB', 'AC', 'BC'].filter((pair) => {
				const [before = '', after = ''] = pair.toLowerCase();
				return turnsSomewhere(composition, before, after, least);
			});
			expect(found).toEqual(expected);
		}),
		{ numRuns: 200 }
	);
});

test('the turning value lies within the range of the constituent that it names', () => {
	fc.assert(
		fc.property(ranges, ranges, (one, two) => {
			const composition = composed(
				{ one, two },
				{
					F: [
						{ material: 'one', percent: '45' },
						{ material: 'two', percent: '55' }
					]
				}
			);
			for (const { turnsAt } of weakPairs(composition, placedIn(composition, ['A', 'B', 'C']), atLeast(0n))) {
				if (!turnsAt) continue;
				const material = composition.weighed.find((each) => each.material === turnsAt.material);
				const share = material?.parts.find((each) => each.constituent === turnsAt.constituent)?.share;
				expect(share && share.low < share.high).toBe(true);
				expect(share && turnsAt.at.num >= share.low * turnsAt.at.den).toBe(true);
				expect(share && turnsAt.at.num <= share.high * turnsAt.at.den).toBe(true);
			}
		})
	);
});

test('narrowing a range never makes a pair weak that was certain', () => {
	fc.assert(
		fc.property(ranges, ranges, fc.nat({ max: 2 }), (one, two, pick) => {
			const formulas = {
				F: [
					{ material: 'one', percent: '45' },
					{ material: 'two', percent: '55' }
				]
			};
			const wide = composed({ one, two }, formulas);
			const range = wide.weighed[0]?.parts[pick]?.share;
			if (!range) return;
			const middle = `${(range.low + range.high) / 2n}`.padStart(9, '0');
			const fixed = `${middle.slice(0, -8) || '0'}.${middle.slice(-8)}`;
			const narrow = composed(
				{ one: one.map((part, at) => (at === pick ? { ...part, min: fixed, max: fixed } : part)), two },
				formulas
			);
			const pairsOf = (composition: Composition) =>
				weakPairs(composition, placedIn(composition, ['A', 'B', 'C']), atLeast(onePercent(composition))).map(
					({ before, after }) => before + after
				);
			const before = pairsOf(wide);
			expect(pairsOf(narrow).filter((pair) => !before.includes(pair))).toEqual([]);
		})
	);
});
