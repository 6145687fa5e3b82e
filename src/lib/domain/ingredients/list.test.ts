import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formatExact } from '../quantity/decimal';
import type { IsoDate, Percent } from '../quantity/units';
import { composed, substancesOf, type Line, type Materials, type Part } from '../testing/formula';
import { ingredientList, orderIsCertain } from './list';
import { GLOSSARY_ONLY, type AllergenEntry, type IngredientList, type Stay } from './types';

/** 0.001 % and 0.01 %, as Annex III has them; names of our own. */
const entry = (
	labelName: string,
	members: AllergenEntry['members'],
	placedFrom: string | null = null
): AllergenEntry => ({
	ruleId: `act/${labelName.toLowerCase()}`,
	labelName,
	members,
	leaveOnAbove: 10_000_000_000_000n as Percent,
	rinseOffAbove: 100_000_000_000_000n as Percent,
	placedFrom: placedFrom as IsoDate | null
});
const ALLERGENS = [
	entry('Sole', [{ inci: 'Sole', cas: ['50-00-0'] }]),
	entry('Group', [
		{ inci: 'Alpha-Group', cas: [] },
		{ inci: 'Beta-Group', cas: [] }
	]),
	entry('Flower Oil', [{ inci: 'Flower Oil', cas: ['64-17-5'] }]),
	entry('Peel Oil', [{ inci: 'Peel Oil', cas: ['64-17-5'] }]),
	entry('Young', [{ inci: 'Young', cas: [] }], '2026-08-01')
];

const WATER = [{ inci: 'Aqua', typical: '100' }];
const perfume = (...inside: [string, string][]): Part[] => [
	{ inci: 'Parfum', typical: '100' },
	...inside.map(([inci, typical]) => ({ inci, typical, ofWhich: 'Parfum' }))
];
function list(materials: Materials, lines: Line[], stay: Stay = 'leave-on', day = '2026-12-01'): IngredientList {
	const all = { water: WATER, ...materials };
	return ingredientList(composed(all, { F: [...lines, { material: 'water', qs: true }] }), {
		market: 'EU',
		stay,
		batchDay: day as IsoDate,
		substances: substancesOf(all),
		allergens: ALLERGENS,
		names: GLOSSARY_ONLY
	});
}
const line = (material: string, percent: string): Line => ({ material, percent });

describe('names', () => {
	test('perfume and water words lead to one name each', () => {
		const materials = {
			fragrance: [{ inci: 'Fragrance', typical: '100' }],
			perfume: perfume(),
			eau: [{ inci: 'Water', typical: '100' }]
		};
		const found = list(materials, [line('fragrance', '0.2'), line('perfume', '0.3'), line('eau', '10')]);
		expect(found.text).toBe('Aqua, Parfum');
		expect(formatExact(found.entries[1]?.share.typical ?? 0n, found.shareDecimals)).toBe('0.5');
	});
	test('a pigment and a filter of one substance stand under two names', () => {
		const found = list(
			{
				filter: [{ inci: 'CI 77891', typical: '100', nano: true, use: 'uvFilter' }],
				pigment: [{ inci: 'CI 77891', typical: '100', use: 'colourant' }]
			},
			[line('filter', '5'), line('pigment', '20')]
		);
		expect(found.entries.map(({ name, block }) => [name, block])).toEqual([
			['Aqua', 'ordered'],
			['CI 77891 (nano)', 'ordered'],
			['CI 77891', 'colourant']
		]);
	});
	test('colourants by colour index number, then by name', () => {
		const colour = (inci: string): Part[] => [{ inci, typical: '100', use: 'colourant' }];
		const found = list(
			{ a: colour('CI 100000'), b: colour('CI 77491'), c: colour('Anthocyanins'), d: colour('CI 15850') },
			[line('a', '5'), line('b', '1'), line('c', '9'), line('d', '0.1')]
		);
		expect(found.text).toBe('Aqua, CI 15850, CI 77491, CI 100000, Anthocyanins');
	});
	test('ties stand by name', () => {
		const materials = { b: [{ inci: 'beta', typical: '100' }], a: [{ inci: 'Alpha', typical: '100' }] };
		expect(list(materials, [line('b', '2'), line('a', '2')]).text).toBe('Aqua, Alpha, beta');
	});
});

describe('what is left out', () => {
	test('impurities and processing aids, with the reason; carry-over is listed', () => {
		const material: Part[] = [
			{ inci: 'Oil', typical: '98' },
			{ inci: 'Tocopherol', typical: '1', role: 'carryOver' },
			{ inci: 'Residue', typical: '0.6', role: 'impurity' },
			{ inci: 'Hexane', typical: '0.4', role: 'processingAid' }
		];
		const found = list({ material }, [line('material', '10')]);
		expect(found.text).toBe('Aqua, Oil, Tocopherol');
		expect(found.leftOut).toMatchObject([
			{ name: 'Hexane', reason: 'processingAid' },
			{ name: 'Residue', reason: 'impurity' }
		]);
	});
	test('what is an impurity here and an ingredient there is listed with its ingredient’s share', () => {
		const found = list(
			{
				a: [{ inci: 'Salt', typical: '100' }],
				b: [
					{ inci: 'Oil', typical: '99' },
					{ inci: 'Salt', typical: '1', role: 'impurity' }
				]
			},
			[line('a', '2'), line('b', '10')]
		);
		expect(formatExact(found.entries.find(({ name }) => name === 'Salt')?.share.typical ?? 0n, 16)).toBe('2');
		expect(found.leftOut).toEqual([]);
	});
});

describe('allergens', () => {
	test('above the threshold only, leave-on and rinse-off each by its own', () => {
		const materials = { perfume: perfume(['Sole', '1']) };
		expect(list(materials, [line('perfume', '0.1')]).text).toBe('Aqua, Parfum');
		expect(list(materials, [line('perfume', '0.100001')]).text).toBe('Aqua, Parfum, Sole');
		expect(list(materials, [line('perfume', '1')], 'rinse-off').text).toBe('Aqua, Parfum');
		expect(list(materials, [line('perfume', '1.000001')], 'rinse-off').text).toBe('Aqua, Parfum, Sole');
	});
	test('what is at or below is left out with entry, share and limit', () => {
		const found = list({ perfume: perfume(['Sole', '1']) }, [line('perfume', '0.1')]);
		expect(found.leftOut).toMatchObject([
			{
				name: 'Sole',
				reason: 'allergenAtOrBelow',
				ruleId: 'act/sole',
				limit: 10_000_000_000_000n,
				share: { typical: 10_000_000_000_000n }
			}
		]);
	});
	test('members of a group are summed under its name, over every source', () => {
		const materials = {
			perfume: perfume(['Alpha-Group', '0.6']),
			oil: [
				{ inci: 'Oil', typical: '100' },
				{ inci: 'Beta-Group', typical: '0.006', ofWhich: 'Oil' }
			]
		};
		expect(list(materials, [line('perfume', '0.1'), line('oil', '10')]).text).toBe('Aqua, Oil, Parfum, Group');
		expect(list(materials, [line('perfume', '0.1')]).text).toBe('Aqua, Parfum');
	});
	test('added as such it is an ingredient at any share, and never named twice', () => {
		const materials = {
			sole: [{ inci: 'Sole', typical: '100', use: 'preservative' as const }],
			perfume: perfume(['Sole', '5'])
		};
		const below = list(materials, [line('sole', '0.0005')]);
		expect(below.text).toBe('Aqua, Sole');
		const both = list(materials, [line('sole', '0.9'), line('perfume', '0.2')]);
		expect(both.text).toBe('Aqua, Sole, Parfum');
		expect(both.leftOut).toEqual([]);
		expect(formatExact(both.entries[1]?.share.typical ?? 0n, both.shareDecimals)).toBe('0.91');
		expect(both.entries[1]?.why.filter(({ kind }) => kind === 'contribution')).toHaveLength(2);
	});
	test('a number shared by two entries decides nothing where the name does', () => {
		const oil = (inci: string): Part[] => [{ inci, typical: '100', cas: '64-17-5' }];
		expect(list({ oil: oil('Peel Oil') }, [line('oil', '0.5')]).text).toBe('Aqua, Peel Oil');
		expect(list({ oil: [{ inci: 'Solum', typical: '100', cas: '50-00-0' }] }, [line('oil', '0.5')]).text).toBe(
			'Aqua, Sole'
		);
	});
	test('a young entry from its day on', () => {
		const materials = { perfume: perfume(['Young', '5']) };
		const before = list(materials, [line('perfume', '0.5')], 'leave-on', '2026-07-31');
		expect(before.text).toBe('Aqua, Parfum');
		expect(before.leftOut).toMatchObject([{ name: 'Young', reason: 'allergenNotYet' }]);
		expect(list(materials, [line('perfume', '0.5')], 'leave-on', '2026-08-01').text).toBe('Aqua, Parfum, Young');
	});
	test('a range across the threshold is a question, with whom to ask', () => {
		const ranged = {
			perfume: [
				{ inci: 'Parfum', typical: '100' },
				{ inci: 'Sole', min: '0.5', max: '1.2', ofWhich: 'Parfum' }
			]
		};
		const found = list(ranged, [line('perfume', '0.1')]);
		expect(found.text).toBe('Aqua, Parfum');
		expect(found.questions).toMatchObject([{ kind: 'allergen', name: 'Sole', printed: false, ask: 'perfume' }]);
		expect(list(ranged, [line('perfume', '0.3')]).questions).toEqual([]);
	});
});

describe('certainty', () => {
	test('the order is certain until a range can turn it', () => {
		const glycerin = (min: string, max: string): Materials => ({
			oil: [{ inci: 'Oil', typical: '100' }],
			mix: [{ inci: 'Glycerin', min, max }, { inci: 'Aqua' }]
		});
		const lines = [line('oil', '3'), line('mix', '5')];
		expect(orderIsCertain(list(glycerin('50', '60'), lines))).toBe(true);
		expect(orderIsCertain(list(glycerin('50', '61'), lines))).toBe(false);
	});
});

const INCI = ['Aqua', 'Parfum', 'Sole', 'Alpha-Group', 'Beta-Group', 'Oil', 'Salt', 'CI 15850'];
const constituent = fc.record({
	inci: fc.constantFrom(...INCI),
	weight: fc.integer({ min: 1, max: 20 }),
	role: fc.constantFrom('ingredient' as const, 'carryOver' as const, 'impurity' as const, 'processingAid' as const)
});
const material = fc.array(constituent, { minLength: 1, maxLength: 5 }).map((parts): Part[] => [
	{ inci: 'Base' },
	...parts.map(({ inci, weight, role }): Part => ({
		inci,
		typical: `${weight / 2}`,
		role,
		use: inci.startsWith('CI') ? 'colourant' : 'other'
	}))
]);
const materials = fc.record({ a: material, b: material });
const LINES = [line('a', '3'), line('b', '0.7')];

describe('whatever the formula', () => {
	test('every row stands in the list or among what was left out, once', () => {
		fc.assert(
			fc.property(materials, (all) => {
				const found = list(all, LINES);
				const composition = composed({ water: WATER, ...all }, { F: [...LINES, { material: 'water', qs: true }] });
				const printed = found.entries.flatMap(({ rows }) => rows.map(({ key }) => key));
				expect(new Set(printed).size).toBe(printed.length);
				expect(printed.length + found.leftOut.length).toBe(composition.rows.length);
				expect(new Set(found.entries.map(({ name }) => name)).size).toBe(found.entries.length);
			})
		);
	});
	test('descending before the colourants, and 1 % parts the blocks', () => {
		fc.assert(
			fc.property(materials, (all) => {
				const found = list(all, LINES);
				const weighed = found.entries.filter(({ block }) => block !== 'colourant');
				const onePercent = 10n ** BigInt(found.shareDecimals);
				weighed.forEach(({ share, block }, at) => {
					const before = weighed[at - 1];
					expect(before === undefined || before.share.typical >= share.typical).toBe(true);
					expect(block).toBe(share.typical >= onePercent ? 'ordered' : 'free');
				});
				expect(found.entries.slice(0, weighed.length)).toEqual(weighed);
			})
		);
	});
	test('neither the order of lines nor of constituents shows', () => {
		fc.assert(
			fc.property(materials, (all) => {
				const turned = { a: [...all.a].reverse(), b: [...all.b].reverse() };
				expect(list(turned, [...LINES].reverse()).text).toBe(list(all, LINES).text);
			})
		);
	});
});
