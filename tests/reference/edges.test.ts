import { describe, expect, test } from 'vitest';
import type { Materials } from '../../src/lib/domain/testing/formula';
import { formula, listOf, namesIn, parts, pure, shareOf } from './support/list';

describe('edges (fact base, B.6 "Extra edge tests")', () => {
	test('1.0000 % is ordered and 0.9999 % is free, on the full sum', () => {
		const materials = { water: pure('Aqua'), a: pure('Betaine'), b: pure('Panthenol') };
		const list = listOf(materials, formula(['water', '98.0001'], ['a', '1.0000'], ['b', '0.9999']));
		expect(namesIn(list, 'ordered')).toEqual(['Aqua', 'Betaine']);
		expect(namesIn(list, 'free')).toEqual(['Panthenol']);
	});
	test('a hair dye stands in the weight order, a colourant at the end', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			dye: [{ inci: 'Basic Red 51', typical: '100', use: 'hairDye' }],
			pigment: [{ inci: 'CI 77491', typical: '100', use: 'colourant' }],
			thickener: pure('Xanthan Gum')
		};
		const list = listOf(materials, formula(['water', '90'], ['pigment', '6'], ['dye', '3'], ['thickener', '1']));
		expect(list.text).toBe('Aqua, Basic Red 51, Xanthan Gum, CI 77491');
	});
	test('a name of (EU) 2023/1545 is printed from the batch of 1 August 2026', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Linalyl Acetate', typical: '3', ofWhich: 'Parfum' }
			]
		};
		const formulas = formula(['water', '99.6'], ['perfume', '0.4']);
		expect(listOf(materials, formulas, { day: '2026-07-31' }).text).toBe('Aqua, Parfum');
		expect(listOf(materials, formulas, { day: '2026-08-01' }).text).toBe('Aqua, Parfum, Linalyl Acetate');
	});
	test('thresholds are exceeded, not reached: exactly 0.001 % in a leave-on product is not named', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Coumarin', typical: '1', ofWhich: 'Parfum' }
			]
		};
		expect(listOf(materials, formula(['water', '99.9'], ['perfume', '0.1'])).text).toBe('Aqua, Parfum');
		expect(listOf(materials, formula(['water', '99.89'], ['perfume', '0.11'])).text).toBe('Aqua, Parfum, Coumarin');
	});
	test('one group name for several damascones, summed: Rose Ketones (Annex III, 157)', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Alpha-Damascone', typical: '0.6', ofWhich: 'Parfum' },
				{ inci: 'Beta-Damascone', typical: '0.6', ofWhich: 'Parfum', cas: '23726-91-2' }
			]
		};
		expect(listOf(materials, formula(['water', '99.9'], ['perfume', '0.1'])).text).toBe('Aqua, Parfum, Rose Ketones');
	});
	test('benzyl alcohol as preservative and in the perfume stands once, with both amounts', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			preservative: [{ inci: 'Benzyl Alcohol', typical: '100', use: 'preservative' }],
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Benzyl Alcohol', typical: '5', ofWhich: 'Parfum' }
			]
		};
		const list = listOf(materials, formula(['water', '98.9'], ['preservative', '0.9'], ['perfume', '0.2']));
		expect(list.text).toBe('Aqua, Benzyl Alcohol, Parfum');
		expect(shareOf(list, 'Benzyl Alcohol')).toBe('0.91');
	});
	test('an oil and its constituents are named beside each other, each above its own threshold (fact base, B.3)', () => {
		const materials: Materials = {
			water: pure('Aqua'),
			lavender: [
				{ inci: 'Lavandula Angustifolia Oil', typical: '100' },
				...parts(['Linalool', '35'], ['Linalyl Acetate', '30'], ['Limonene', '0.5']).map((each) => ({
					...each,
					ofWhich: 'Lavandula Angustifolia Oil'
				}))
			]
		};
		const list = listOf(materials, formula(['water', '99.8'], ['lavender', '0.2']));
		expect(list.text).toBe('Aqua, Lavandula Oil/Extract, Linalool, Linalyl Acetate');
		expect(list.leftOut).toMatchObject([{ name: 'Limonene', reason: 'allergenAtOrBelow' }]);
	});
	test('0.02 % of perfume in a rinse-off product names an allergen only above half of the perfume', () => {
		const materials = (percent: string): Materials => ({
			water: pure('Aqua'),
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Limonene', typical: percent, ofWhich: 'Parfum' }
			]
		});
		const formulas = formula(['water', '99.98'], ['perfume', '0.02']);
		expect(listOf(materials('50'), formulas, { stay: 'rinse-off' }).text).toBe('Aqua, Parfum');
		expect(listOf(materials('50.1'), formulas, { stay: 'rinse-off' }).text).toBe('Aqua, Parfum, Limonene');
	});
});
