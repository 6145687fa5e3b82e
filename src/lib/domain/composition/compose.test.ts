import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formatExact } from '../quantity/decimal';
import type { Id } from '../quantity/units';
import { composed, requestOf, type Formulas, type Line, type Materials } from '../testing/formula';
import { compose } from './compose';
import type { Composition } from './types';

const WATER: Materials = { water: [{ inci: 'Aqua', typical: '100' }] };

const rowOf = (composition: Composition, substance: string) =>
	composition.rows.find((row) => row.substance === substance);
function figures(composition: Composition, substance: string) {
	const share = rowOf(composition, substance)?.share;
	const text = (value: bigint | undefined) => formatExact(value ?? 0n, composition.shareDecimals);
	return [text(share?.low), text(share?.typical), text(share?.high)];
}
const faultsOf = (materials: Materials, formulas: Formulas, formula = 'F') => {
	const outcome = compose(requestOf(materials, formulas, formula));
	return outcome.ok ? [] : outcome.faults;
};

describe('amounts', () => {
	const glycerin: Materials = { ...WATER, glycerin: [{ inci: 'Glycerin', typical: '100' }] };
	test('the q.s. line takes what is left', () => {
		const composition = composed(glycerin, {
			F: [
				{ material: 'glycerin', percent: '3.000001' },
				{ material: 'water', qs: true }
			]
		});
		expect(figures(composition, 'aqua')[1]).toBe('96.999999');
	});
	test('a range line moves against the q.s. line', () => {
		const composition = composed(glycerin, {
			F: [
				{ material: 'glycerin', percent: '3', min: '2', max: '5' },
				{ material: 'water', qs: true }
			]
		});
		expect(figures(composition, 'glycerin')).toEqual(['2', '3', '5']);
		expect(figures(composition, 'aqua')).toEqual(['95', '97', '98']);
	});
	test.each<[string, Line[], object]>([
		['above 100', [{ material: 'water', percent: '100.000001' }], { kind: 'sumAbove100', by: 1n }],
		['below 100', [{ material: 'water', percent: '99.999999' }], { kind: 'sumBelow100', by: 1n }],
		[
			'two q.s. lines',
			[
				{ material: 'water', qs: true },
				{ material: 'water', qs: true }
			],
			{ kind: 'severalQs' }
		],
		['no lines', [], { kind: 'noLines' }],
		['a range without a q.s. line', [{ material: 'water', percent: '100', min: '99' }], { kind: 'rangeWithoutQs' }],
		[
			'a range upside down',
			[
				{ material: 'glycerin', percent: '3', min: '4' },
				{ material: 'water', qs: true }
			],
			{ kind: 'rangeUpsideDown' }
		],
		[
			'a range that can leave less than nothing',
			[
				{ material: 'glycerin', percent: '60', max: '101' },
				{ material: 'water', qs: true }
			],
			{ kind: 'sumAbove100' }
		],
		['an unknown material', [{ material: 'oil', percent: '100' }], { kind: 'materialMissing', material: 'oil' }],
		['an unknown formula', [{ formula: 'G', percent: '100' }], { kind: 'formulaMissing', formula: 'G' }]
	])('%s', (_, lines, fault) => expect(faultsOf(glycerin, { F: lines })).toMatchObject([fault]));
	test('eleven range lines over formula and bulk together are too many', () => {
		const adjusted = (count: number): Line[] => [
			...Array.from({ length: count }, () => ({ material: 'glycerin', percent: '1', max: '2' })),
			{ material: 'water', qs: true }
		];
		const formulas = { F: [{ formula: 'B', percent: '10' }, ...adjusted(6)], B: adjusted(5) };
		expect(faultsOf(glycerin, formulas)).toEqual([{ kind: 'tooManyRanges', formula: 'F', limit: 10 }]);
	});
	test('a contradictory material is named with its own fault', () => {
		expect(
			faultsOf({ bad: [{ inci: 'Aqua', typical: '90' }] }, { F: [{ material: 'bad', percent: '100' }] })
		).toMatchObject([{ kind: 'material', material: 'bad', version: 'bad@1', fault: { kind: 'maximaBelow100' } }]);
	});
});

describe('bulks', () => {
	const materials: Materials = { ...WATER, blend: [{ inci: 'Glycerin', min: '50', max: '60' }, { inci: 'Aqua' }] };
	test('multiply out exactly at any depth, however small', () => {
		const tiny = { percent: '0.000001' };
		const rest: Line = { material: 'water', qs: true };
		const composition = composed(
			{
				...WATER,
				trace: [
					{ inci: 'Trace', typical: '0.00000001' },
					{ inci: 'Aqua', typical: '99.99999999' }
				]
			},
			{
				F: [{ formula: 'B', ...tiny }, rest],
				B: [{ formula: 'C', ...tiny }, rest],
				C: [{ material: 'trace', ...tiny }, rest]
			}
		);
		expect(composition.levels).toBe(2);
		expect(rowOf(composition, 'trace')?.share.typical).toBe(1n);
		expect(figures(composition, 'trace')[1]).toBe(`0.${'0'.repeat(31)}1`);
	});
	test('one material has one composition, whichever lines and bulks carry it', () => {
		const composition = composed(materials, {
			F: [
				{ material: 'blend', percent: '10' },
				{ formula: 'B', percent: '50' },
				{ material: 'water', qs: true }
			],
			B: [
				{ material: 'blend', percent: '20' },
				{ material: 'water', qs: true }
			]
		});
		expect(figures(composition, 'glycerin')).toEqual(['10', '11', '12']);
		expect(figures(composition, 'aqua')).toEqual(['88', '89', '90']);
		expect(rowOf(composition, 'glycerin')?.contributions.map(({ path }) => path)).toEqual([['F#0'], ['F#1', 'B#0']]);
	});
	test('a formula that contains itself is a fault that names the way round', () => {
		const formulas = {
			F: [{ formula: 'B', percent: '100' }],
			B: [{ formula: 'C', percent: '100' }],
			C: [{ formula: 'B', percent: '100' }]
		};
		expect(faultsOf(materials, formulas)).toEqual([{ kind: 'cycle', path: ['B', 'C', 'B'] }]);
	});
});

describe('rows', () => {
	test('nano form and use make rows of their own', () => {
		const composition = composed(
			{
				mix: [
					{ inci: 'Titanium Dioxide', typical: '40', nano: true, use: 'uvFilter' },
					{ inci: 'Titanium Dioxide', typical: '30', use: 'colourant' },
					{ inci: 'Titanium Dioxide', typical: '30' }
				]
			},
			{ F: [{ material: 'mix', percent: '100' }] }
		);
		expect(composition.rows.map(({ key }) => key)).toEqual([
			'titanium dioxide|nano|uvFilter',
			'titanium dioxide||colourant',
			'titanium dioxide||other'
		]);
	});
	test('one substance on two rows of a material is bounded jointly', () => {
		const composition = composed(
			{
				mix: [
					{ inci: 'Aqua', min: '10', max: '50' },
					{ inci: 'Aqua', min: '10', max: '50', role: 'impurity' },
					{ inci: 'Oil', min: '30', max: '50' }
				]
			},
			{ F: [{ material: 'mix', percent: '100' }] }
		);
		expect(figures(composition, 'aqua')).toEqual(['50', '60', '70']);
		expect(rowOf(composition, 'aqua')?.roles).toEqual(new Set(['ingredient', 'impurity']));
	});
	test('parts of one parent are bounded by it together; a part counted with its parent is not counted twice', () => {
		const composition = composed(
			{
				...WATER,
				perfume: [
					{ inci: 'Parfum', min: '40', max: '60' },
					{ inci: 'Dipropylene Glycol' },
					{ inci: 'Linalool', max: '50', ofWhich: 'Parfum' },
					{ inci: 'Linalool', max: '50', ofWhich: 'Parfum', use: 'preservative' }
				]
			},
			{
				F: [
					{ material: 'perfume', percent: '10' },
					{ material: 'water', qs: true }
				]
			}
		);
		expect(figures(composition, 'linalool')).toEqual(['0', '2.5', '5']);
	});
	test('"less than" stays open through the formula, until something else limits first', () => {
		const open = (rest: { min?: string }) =>
			composed(
				{
					...WATER,
					mix: [
						{ inci: 'Acid', max: '1', open: true },
						{ inci: 'Oil', ...rest }
					]
				},
				{
					F: [
						{ material: 'mix', percent: '50' },
						{ material: 'water', qs: true }
					]
				}
			);
		expect(rowOf(open({}), 'acid')?.share).toMatchObject({ highOpen: true });
		expect(rowOf(open({ min: '99.5' }), 'acid')?.share).toMatchObject({ highOpen: false });
	});
});

const width = fc.tuple(fc.integer({ min: 0, max: 30 }), fc.integer({ min: 0, max: 70 }));
const mixture = fc
	.array(width, { minLength: 1, maxLength: 4 })
	.map((parts) => [
		{ inci: 'Balance' },
		...parts.map(([low, extra], at) => ({ inci: `S${at}`, min: String(low), max: String(low + extra) }))
	])
	.filter((parts) => parts.reduce((total, part) => total + Number('min' in part ? part.min : 0), 0) <= 100);
const plan = fc.record({
	a: mixture,
	b: mixture,
	weights: fc.tuple(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 1, max: 40 }))
});
const linesOf = ([a, b]: readonly [number, number]): Line[] => [
	{ material: 'a', percent: String(a) },
	{ material: 'b', percent: String(b) },
	{ formula: 'B', percent: '5' },
	{ material: 'water', qs: true }
];
const bulk: Line[] = [
	{ material: 'a', percent: '33.3' },
	{ material: 'water', qs: true }
];
const summary = (composition: Composition) =>
	new Map(composition.rows.map(({ key, share }) => [key, [share.low, share.typical, share.high]]));

describe('whatever the formula', () => {
	test('nothing is lost or invented: rows sum to 100 %, and contributions to their row', () => {
		fc.assert(
			fc.property(plan, ({ a, b, weights }) => {
				const composition = composed({ ...WATER, a, b }, { F: linesOf(weights), B: bulk });
				const total = composition.rows.reduce((sum, row) => sum + row.share.typical, 0n);
				expect(total).toBe(10n ** BigInt(composition.shareDecimals + 2));
				for (const { share, contributions } of composition.rows) {
					expect(contributions.reduce((sum, each) => sum + each.share.typical, 0n)).toBe(share.typical);
					expect(contributions.reduce((sum, each) => sum + each.share.low, 0n) <= share.low).toBe(true);
					expect(contributions.reduce((sum, each) => sum + each.share.high, 0n) >= share.high).toBe(true);
					expect(share.low <= share.typical && share.typical <= share.high).toBe(true);
				}
			})
		);
	});
	test('the order of the lines does not matter', () => {
		fc.assert(
			fc.property(plan, ({ a, b, weights }) => {
				const forth = composed({ ...WATER, a, b }, { F: linesOf(weights), B: bulk });
				const back = composed({ ...WATER, a, b }, { F: linesOf(weights).reverse(), B: [...bulk].reverse() });
				expect(summary(back)).toEqual(summary(forth));
			})
		);
	});
	test('two lines of one material are one line of both weights', () => {
		fc.assert(
			fc.property(plan, ({ a, b, weights: [x, y] }) => {
				const apart: Line[] = [
					{ material: 'a', percent: String(x) },
					{ material: 'a', percent: String(y) },
					{ material: 'b', qs: true }
				];
				const together: Line[] = [
					{ material: 'a', percent: String(x + y) },
					{ material: 'b', qs: true }
				];
				expect(summary(composed({ a, b }, { F: apart }))).toEqual(summary(composed({ a, b }, { F: together })));
			})
		);
	});
	test('a line at one end of its range lies within what the range gives', () => {
		fc.assert(
			fc.property(plan, ({ a, b, weights: [x, y] }) => {
				const materials = { ...WATER, a, b };
				const rest: Line[] = [
					{ material: 'b', percent: String(y) },
					{ material: 'water', qs: true }
				];
				const wide = composed(materials, { F: [{ material: 'a', percent: String(x), min: '0', max: '50' }, ...rest] });
				const fixed = composed(materials, { F: [{ material: 'a', percent: '50' }, ...rest] });
				for (const row of fixed.rows) {
					const share = wide.rows.find(({ key }) => key === row.key)?.share;
					expect(share && share.low <= row.share.low && share.high >= row.share.high).toBe(true);
				}
			})
		);
	});
});

test('formula and version ids stay with the caller', () => {
	expect(composed(WATER, { F: [{ material: 'water', percent: '100' }] }).formula).toBe('F' as Id<'formula'>);
});
