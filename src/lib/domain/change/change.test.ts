import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { IsoDate } from '../quantity/units';
import { ingredientList } from '../ingredients/list';
import { GLOSSARY_ONLY } from '../ingredients/types';
import { composed, substancesOf, type Materials } from '../testing/formula';
import { canonicalText } from './canonical';
import { listProjection } from './projection';

describe('canonicalText', () => {
	// Stored hashes rest on these texts: they may never change.
	test.each([
		[{ b: 1n, a: 'x' }, '{"a":"x","b":"1"}'],
		[[3n, null, true, 2], '["3",null,true,2]'],
		[{ gone: undefined, kept: null }, '{"kept":null}'],
		[{ text: 'é "quoted"\n' }, '{"text":"é \\"quoted\\"\\n"}'],
		[{ Z: 1, a: { d: [], c: {} } }, '{"Z":1,"a":{"c":{},"d":[]}}'],
		[undefined, 'null']
	])('golden %#', (value, text) => expect(canonicalText(value)).toBe(text));
	test('the order of keys never shows', () => {
		fc.assert(
			fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
				const turned = Object.fromEntries(Object.entries(value).reverse());
				expect(canonicalText(turned)).toBe(canonicalText(value));
			})
		);
	});
});

describe('listProjection', () => {
	const listAt = (percent: string, materials: Materials) => {
		const all = { water: [{ inci: 'Aqua', typical: '100' }], ...materials };
		const composition = composed(all, {
			F: [
				{ material: 'a', percent },
				{ material: 'b', percent: '3' },
				{ material: 'water', qs: true }
			]
		});
		return ingredientList(composition, {
			market: 'EU',
			stay: 'leave-on',
			batchDay: '2026-12-01' as IsoDate,
			substances: substancesOf(all),
			allergens: [],
			names: GLOSSARY_ONLY
		});
	};
	const materials = { a: [{ inci: 'Glycerin', typical: '100' }], b: [{ inci: 'Betaine', typical: '100' }] };

	// Raise the revision together with this text, never alone.
	test('golden', () => {
		expect(listProjection(listAt('5', materials))).toEqual({
			kind: 'list',
			subject: 'EU',
			rev: 1,
			text: '{"market":"EU","names":["Aqua","Glycerin","Betaine"]}'
		});
	});
	test('rests on names and their order, not on percentages', () => {
		expect(listProjection(listAt('4', materials))).toEqual(listProjection(listAt('5', materials)));
		expect(listProjection(listAt('2', materials))).not.toEqual(listProjection(listAt('5', materials)));
	});
});
