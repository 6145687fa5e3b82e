import { describe, expect, test } from 'vitest';
import { computeInputSchema } from '$lib/schemas/compute';
import { Refused } from '../refused';
import { computeComposition, computeLists } from './compute';

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
