import { describe, expect, test } from 'vitest';
import { batchSheetInputSchema, computeInputSchema } from '$lib/schemas/compute';
import { Refused } from '../refused';
import { computeComposition } from './compute';
import { computeBatchSheet } from './compute-batch-sheet';
import { computeLists } from './compute-lists';

const input = (more: object = {}) =>
	computeInputSchema.parse({
		materials: {
			M1: {
				constituents: [
					{ inci: 'Glycerin', cas: '56-81-5', min: '48', typical: '50', max: '52' },
					{ inci: 'Titanium Dioxide', min: '36', typical: '38', max: '40', nano: true, use: 'uvFilter' },
					{ inci: 'Parfum', min: '10', typical: '11.999', max: '14' },
					{ inci: 'Linalool', ofWhich: 'Parfum', typical: '1,2' },
					{ inci: '1,4-Dioxane', role: 'impurity', typical: '0.001' }
				]
			},
			W: { constituents: [{ inci: 'Aqua', typical: '100' }] },
			B: { constituents: [{ inci: 'Sodium Chloride', typical: '100' }] }
		},
		formulas: {
			BASE: {
				lines: [
					{ material: 'M1', percent: '5.00' },
					{ material: 'W', qs: true }
				]
			},
			VAR: {
				lines: [
					{ formula: 'BASE', qs: true },
					{ material: 'B', min: '2.5', percent: '3', max: '3.5' }
				]
			}
		},
		formula: 'VAR',
		use: { type: 'face-cream', stay: 'leave-on' },
		batch: { placed: '2026-12-01' },
		markets: ['EU'],
		...more
	});

describe('composition', () => {
	test('a bulk is multiplied out exactly and its path is named', () => {
		const { rows, faults } = computeComposition(input());
		expect(faults).toEqual([]);
		// 0.97 × 5 % × 50 % = 2.425 %; at 3.5 % salt and 48 % glycerin: 0.965 × 5 × 0.48 = 2.316 %.
		expect(rows.find((row) => row.inci === 'Glycerin')).toMatchObject({
			low: '2.316',
			typical: '2.425',
			high: '2.535',
			basis: 'declared',
			contributions: [{ path: ['VAR', 'BASE', 'M1'] }]
		});
		expect(rows.find((row) => row.inci === 'Sodium Chloride')).toMatchObject({ low: '2.5', typical: '3', high: '3.5' });
	});
	test('a contradiction gives no rows and says by how much', () => {
		const materials = {
			X: {
				constituents: [
					{ inci: 'Aqua', min: '60', max: '70' },
					{ inci: 'Glycerin', min: '45', max: '50' }
				]
			}
		};
		expect(
			computeComposition(input({ materials, formulas: { VAR: { lines: [{ material: 'X', percent: '100' }] } } }))
		).toEqual({
			rows: [],
			faults: [{ material: 'X', kind: 'minimaAbove100', by: '5' }]
		});
	});
	test('a wrong check digit is refused with the right one', () => {
		const materials = { X: { constituents: [{ inci: 'Glycerin', cas: '56-81-4', typical: '100' }] } };
		const call = () =>
			computeComposition(input({ materials, formulas: { VAR: { lines: [{ material: 'X', percent: '100' }] } } }));
		expect(call).toThrow(Refused);
	});
});

describe('lists', () => {
	test('the EU list with nano, perfume, allergen and what is left out', () => {
		const { lists } = computeLists(input());
		expect(lists).toMatchObject({
			EU: {
				text: 'Aqua, Sodium Chloride, Glycerin, Titanium Dioxide (nano), Parfum, Linalool',
				leftOut: [{ inci: '1,4-Dioxane', reason: 'impurity' }]
			}
		});
	});
	test('without "complete" it says what it assumed; with it, what is not stated stays open', () => {
		expect(computeLists(input())).toHaveProperty('assumed');
		const answered = computeLists(
			input({ complete: [{ material: 'M1', question: 'allergens', document: 'D', date: '2026-01-01' }] })
		);
		expect(answered).not.toHaveProperty('assumed');
		expect(JSON.stringify(answered)).toContain('"material":"W","question":"allergens"');
	});
});

describe('lists of several markets', () => {
	test('each by its own order and names', () => {
		const { lists } = computeLists(input({ markets: ['EU', 'US', 'CA'] }));
		expect(Object.fromEntries(Object.entries(lists).map(([market, { text }]) => [market, text]))).toEqual({
			EU: 'Aqua, Sodium Chloride, Glycerin, Titanium Dioxide (nano), Parfum, Linalool',
			US: 'Water, Sodium Chloride, Glycerin, Titanium Dioxide, Fragrance',
			CA: 'Aqua/Water/Eau, Sodium Chloride, Glycerin, Titanium Dioxide, Linalool, Parfum'
		});
	});
	// Salt without a range: with one, its place before glycerin would be weak, and every order with it refused.
	const fixed = {
		BASE: {
			lines: [
				{ material: 'M1', percent: '5.00' },
				{ material: 'W', qs: true }
			]
		},
		VAR: {
			lines: [
				{ formula: 'BASE', qs: true },
				{ material: 'B', percent: '3' }
			]
		}
	};
	const names = ['Aqua', 'Sodium Chloride', 'Glycerin', 'Titanium Dioxide (nano)', 'Linalool', 'Parfum'];
	test('an arrangement is kept where it is lawful', () => {
		const { lists } = computeLists(input({ formulas: fixed, arrangement: { EU: names } }));
		expect(lists).toMatchObject({ EU: { text: names.join(', ') } });
		expect(JSON.stringify(lists)).not.toContain('refused');
	});
	test('and refused with the pair where it is not', () => {
		const wrong = ['Aqua', 'Glycerin', 'Sodium Chloride', ...names.slice(3)];
		const { lists } = computeLists(input({ arrangement: { EU: wrong } }));
		expect(lists).toMatchObject({ EU: { refused: [{ name: 'Glycerin', before: 'Sodium Chloride', code: 'weight' }] } });
	});
	test('a name that is not printed, or is missing, is named with its place', () => {
		const call = () => computeLists(input({ arrangement: { EU: [...names.slice(1), 'Urea'] } }));
		expect(call).toThrow(
			expect.objectContaining({
				data: {
					errors: [
						expect.objectContaining({ path: 'arrangement.EU.5', value: 'Urea' }),
						expect.objectContaining({ path: 'arrangement.EU', value: 'Aqua' })
					]
				}
			})
		);
	});
	test('what only some shades hold stands behind the mark', () => {
		const pigment = (inci: string) => ({ constituents: [{ inci, typical: '100', use: 'colourant' }] });
		const materials = {
			W: { constituents: [{ inci: 'Aqua', typical: '100' }] },
			P1: pigment('CI 77491'),
			P2: pigment('CI 77492')
		};
		const { lists } = computeLists(
			input({
				materials,
				formulas: { VAR: { lines: [{ material: 'W', qs: true }] } },
				shades: {
					'01': [{ material: 'P1', percent: '3' }],
					'02': [
						{ material: 'P1', percent: '1' },
						{ material: 'P2', percent: '1' }
					]
				}
			})
		);
		expect(lists).toMatchObject({
			EU: {
				text: 'Aqua, CI 77491, [+/- CI 77492]',
				entries: [{ block: 'ordered' }, { block: 'colourant', low: '1', high: '3' }, { block: 'mayContain', low: '0' }]
			}
		});
	});
});

describe('a batch sheet', () => {
	const sheet = (more: object) => {
		const { materials, formulas, formula } = input();
		return computeBatchSheet(
			batchSheetInputSchema.parse({ materials, formulas, formula, size: '4000', unit: 'g', step: '0.01', ...more })
		);
	};
	test('is exploded through the bulk and sums to the size', () => {
		// 4,000 g: salt 3 % = 120 g; the bulk 3,880 g with 5 % of M1 = 194 g, water the rest.
		expect(sheet({})).toMatchObject({
			lines: [
				{ material: 'M1', path: ['VAR', 'BASE', 'M1'], amount: '194', exact: '194' },
				{ material: 'W', path: ['VAR', 'BASE', 'W'], amount: '3686', takesRounding: true },
				{ material: 'B', path: ['VAR', 'B'], amount: '120' }
			],
			total: '4000'
		});
	});
	test('of no whole number of balance steps is refused', () => {
		expect(() => sheet({ size: '100.005' })).toThrow(Refused);
	});
	test.each(['0', '-1', 'much'])('of %s g is no batch', (size) => expect(() => sheet({ size })).toThrow());
});
