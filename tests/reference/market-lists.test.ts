import { describe, expect, test } from 'vitest';
import { shadedList } from '../../src/lib/domain/ingredients/list';
import type { Market } from '../../src/lib/domain/ingredients/types';
import type { IsoDate } from '../../src/lib/domain/quantity/units';
import { composed, substancesOf, type Formulas, type Materials, type Part } from '../../src/lib/domain/testing/formula';
import { ALLERGENS, NAME_BOOK } from '../../src/lib/reference';
import { listOf, namesIn, pure } from './support/list';

// Source of every expected list: the fact base on other markets, F "Worked ingredient lists" (F1, F3, F5), after 21 CFR 701.3,
// the Cosmetic Regulations of Canada (C.R.C., c. 869, s. 21) and the assimilated Regulation 1223/2009 of Great Britain. The
// ordered block is compared as a sequence; the free part and the colourants may stand in any order and are compared as sets.

const single = (amounts: readonly (readonly [string, string, Partial<Part>?])[]): [Materials, Formulas] => [
	Object.fromEntries(amounts.map(([inci, , more]) => [inci, [{ inci, typical: '100', ...more }]])),
	{ F: amounts.map(([material, percent]) => ({ material, percent })) }
];
const split = (text: string) => text.split(', ');

describe('F1: face cream, leave-on', () => {
	const [plain, lines] = single([
		['Aqua', '68.25'],
		['Caprylic/Capric Triglyceride', '7'],
		['Glycerin', '6'],
		['Butyrospermum Parkii Butter', '4.2'],
		['Cetearyl Alcohol', '4'],
		['Helianthus Annuus Seed Oil', '3.2'],
		['Glyceryl Stearate', '3'],
		['Niacinamide', '2'],
		['Phenoxyethanol', '0.9'],
		['Tocopherol', '0.5'],
		['Xanthan Gum', '0.4'],
		['Parfum', '0.3'],
		['Citric Acid', '0.15'],
		['Ethylhexylglycerin', '0.1']
	]);
	const inside: [string, string][] = [
		['Limonene', '20'],
		['Linalool', '12'],
		['Linalyl Acetate', '8'],
		['Hexyl Cinnamal', '5'],
		['Citral', '0.2']
	];
	const materials: Materials = {
		...plain,
		Parfum: [...pure('Parfum'), ...inside.map(([inci, typical]) => ({ inci, typical, ofWhich: 'Parfum' }))]
	};
	const list = (market: Market, day = '2026-12-01') => listOf(materials, lines, { market, day });

	test('EU', () => {
		expect(list('EU').text).toBe(
			'Aqua, Caprylic/Capric Triglyceride, Glycerin, Butyrospermum Parkii Butter, Cetearyl Alcohol, Helianthus Annuus Seed Oil, Glyceryl Stearate, Niacinamide, Phenoxyethanol, Tocopherol, Xanthan Gum, Parfum, Citric Acid, Ethylhexylglycerin, Limonene, Linalool, Linalyl Acetate, Hexyl Cinnamal'
		);
	});
	test('GB: as the EU without the names of (EU) 2023/1545', () => {
		expect(list('GB').text).toBe(list('EU').text.replace(', Linalyl Acetate', ''));
	});
	test('United States', () => {
		expect(list('US').text).toBe(
			'Water, Caprylic/Capric Triglyceride, Glycerin, Butyrospermum Parkii (Shea) Butter, Cetearyl Alcohol, Helianthus Annuus (Sunflower) Seed Oil, Glyceryl Stearate, Niacinamide, Phenoxyethanol, Tocopherol, Xanthan Gum, Fragrance, Citric Acid, Ethylhexylglycerin'
		);
	});
	test('Canada', () => {
		expect(list('CA').text).toBe(
			'Aqua/Water/Eau, Caprylic/Capric Triglyceride, Glycerin, Butyrospermum Parkii (Shea) Butter, Cetearyl Alcohol, Helianthus Annuus (Sunflower) Seed Oil, Glyceryl Stearate, Niacinamide, Phenoxyethanol, Tocopherol, Xanthan Gum, Citric Acid, Ethylhexylglycerin, Limonene, Linalool, Linalyl Acetate, Hexyl Cinnamal, Parfum'
		);
	});
	test('Canada: a product first sold before August 2026 need not name the new allergens before August 2028', () => {
		const sold = (firstSold: string, batchDay: string) =>
			namesIn(
				shadedList([composed(materials, lines)], {
					market: 'CA',
					stay: 'leave-on',
					batchDay: batchDay as IsoDate,
					firstSold: firstSold as IsoDate,
					substances: substancesOf(materials),
					allergens: ALLERGENS.CA,
					names: NAME_BOOK
				}),
				'free'
			);
		expect(sold('2026-07-31', '2026-12-01')).not.toContain('Linalyl Acetate');
		expect(sold('2026-07-31', '2026-12-01')).toContain('Limonene');
		expect(sold('2026-07-31', '2028-08-01')).toContain('Linalyl Acetate');
		expect(sold('2026-08-01', '2026-12-01')).toContain('Linalyl Acetate');
	});
	test('Australia and ASEAN name no allergens, Switzerland those of the EU (fact base, G)', () => {
		const without = split(list('EU').text).slice(0, 14).join(', ');
		expect(list('AU').text).toBe(without);
		expect(list('ASEAN').text).toBe(without);
		expect(list('CH').text).toBe(list('EU').text);
	});
});

describe('F3: lipstick range, one label for six shades', () => {
	const colour = (inci: string): Part[] => [{ inci, typical: '100', use: 'colourant' }];
	const base: readonly (readonly [string, string])[] = [
		['Ricinus Communis Seed Oil', '40.8'],
		['Octyldodecanol', '20'],
		['Caprylic/Capric Triglyceride', '12'],
		['Candelilla Cera', '8'],
		['Cera Alba', '6'],
		['Copernicia Cerifera Cera', '4'],
		['Silica', '1'],
		['Tocopherol', '0.5'],
		['Aroma', '0.2']
	];
	const always: readonly (readonly [string, string])[] = [
		['CI 77891', '3'],
		['CI 77019', '2'],
		['CI 15850:1 lake', '1.5'],
		['CI 77491', '1']
	];
	// Some castor oil gives way to the shade's own colour, so that each shade sums to 100.
	const SHADES = [
		'CI 77492',
		'CI 77499',
		'CI 45410 (Na) lake',
		'CI 19140 lake',
		'CI 42090 (Na) lake',
		'CI 75470'
	] as const;
	const materials: Materials = {
		...Object.fromEntries(base.map(([inci]) => [inci, pure(inci)])),
		Aroma: [
			...pure('Aroma'),
			{ inci: 'Vanillin', typical: '15', ofWhich: 'Aroma' },
			{ inci: 'Benzyl Benzoate', typical: '6', ofWhich: 'Aroma' }
		],
		...Object.fromEntries([...always.map(([inci]) => inci), ...SHADES].map((inci) => [inci, colour(inci)]))
	};
	const shade = (own: string) => {
		const [[castor = ''] = [], ...others] = base;
		return composed(materials, {
			F: [
				{ material: castor, qs: true },
				...[...others, ...always, [own, '0.6'] as const].map(([material, percent]) => ({ material, percent }))
			]
		});
	};
	const list = (market: Market) =>
		shadedList(SHADES.map(shade), {
			market,
			stay: 'leave-on',
			batchDay: '2026-12-01' as IsoDate,
			substances: substancesOf(materials),
			allergens: ALLERGENS[market],
			names: NAME_BOOK
		});
	const sets = (market: Market) => {
		const read = list(market);
		return {
			plain: namesIn(read, 'ordered', 'free'),
			colours: namesIn(read, 'colourant').sort(),
			some: namesIn(read, 'mayContain').sort()
		};
	};

	test('EU', () => {
		expect(sets('EU')).toEqual({
			plain: split(
				'Ricinus Communis Seed Oil, Octyldodecanol, Caprylic/Capric Triglyceride, Candelilla Cera, Cera Alba, Copernicia Cerifera Cera, Silica, Tocopherol, Aroma, Vanillin, Benzyl Benzoate'
			),
			colours: split('CI 15850, CI 77019, CI 77491, CI 77891'),
			some: split('CI 19140, CI 42090, CI 45410, CI 75470, CI 77492, CI 77499')
		});
		expect(list('EU').text).toMatch(/, \[\+\/- CI 19140, CI 42090, CI 45410, CI 75470, CI 77492, CI 77499\]$/);
	});
	test('GB: without Vanillin as allergen', () => {
		expect(sets('GB').plain).toEqual(sets('EU').plain.filter((name) => name !== 'Vanillin'));
	});
	test('United States: iron oxides under one name, lakes by their listed names', () => {
		expect(sets('US')).toEqual({
			plain: split(
				'Ricinus Communis (Castor) Seed Oil, Octyldodecanol, Caprylic/Capric Triglyceride, Euphorbia Cerifera (Candelilla) Wax, Beeswax, Copernicia Cerifera (Carnauba) Wax, Silica, Tocopherol, Flavor'
			),
			colours: split('Iron Oxides, Mica, Red 7 Lake, Titanium Dioxide'),
			some: split('Blue 1 Lake, Carmine, Red 28 Lake, Yellow 5 Lake')
		});
		expect(list('US').text).toContain('. May contain: ');
		expect(list('US').questions).toEqual([]);
	});
	test('Canada: aroma behind the colourants, before the mark for shades', () => {
		const { plain, colours, some } = sets('CA');
		expect(plain).toEqual(
			split(
				'Ricinus Communis (Castor) Seed Oil, Octyldodecanol, Caprylic/Capric Triglyceride, Candelilla Cera, Cera Alba, Copernicia Cerifera Cera, Silica, Tocopherol, Vanillin, Benzyl Benzoate, Aroma'
			)
		);
		expect(colours).toEqual(split('CI 15850, CI 77019, CI 77491, CI 77891'));
		expect(some).toEqual(split('CI 19140, CI 42090, CI 45410, CI 75470, CI 77492, CI 77499'));
		expect(list('CA').text).toContain('CI 77891, Aroma, may contain/peut contenir: CI 19140');
	});
	test('exactly 1.00 % silica is ordered in the EU and free in the United States and Canada (fact base, G)', () => {
		const block = (market: Market) => list(market).entries.find(({ name }) => name === 'Silica')?.block;
		expect([block('EU'), block('GB'), block('US'), block('CA'), block('AU'), block('ASEAN'), block('CH')]).toEqual([
			'ordered',
			'ordered',
			'free',
			'free',
			'ordered',
			'ordered',
			'ordered'
		]);
	});
	test('where the name does not tell the salt, the United States list asks for it', () => {
		const untold = { ...materials, 'CI 75470': colour('CI 45380') };
		const { questions } = shadedList(
			[
				composed(untold, {
					F: [
						{ material: 'Octyldodecanol', qs: true },
						{ material: 'CI 75470', percent: '1' }
					]
				})
			],
			{
				market: 'US',
				stay: 'leave-on',
				batchDay: '2026-12-01' as IsoDate,
				substances: substancesOf(untold),
				allergens: [],
				names: NAME_BOOK
			}
		);
		// CI 45380: Red 21 (acid) or Red 22 (sodium), fact base, A12.
		expect(questions).toMatchObject([
			{ kind: 'colourName', doubt: { kind: 'colourForm', candidates: ['Red 21', 'Red 22'] }, ask: 'CI 75470' }
		]);
	});
});

describe('F5: mascara, leave-on, eye area', () => {
	const [materials, lines] = single([
		['Aqua', '58.9'],
		['Cera Alba', '9'],
		['CI 77499', '8', { use: 'colourant' }],
		['Stearic Acid', '5'],
		['Glyceryl Stearate', '4'],
		['Copernicia Cerifera Cera', '3.8'],
		['Butylene Glycol', '3.5'],
		['Acacia Senegal Gum', '3'],
		['Triethanolamine', '1.8'],
		['CI 77266', '1.5', { use: 'colourant', nano: true }],
		['Phenoxyethanol', '0.9'],
		['Panthenol', '0.5'],
		['Ethylhexylglycerin', '0.1']
	]);
	const list = (market: Market) => listOf(materials, lines, { market });
	const EU =
		'Cera Alba, Stearic Acid, Glyceryl Stearate, Copernicia Cerifera Cera, Butylene Glycol, Acacia Senegal Gum, Triethanolamine, Phenoxyethanol, Panthenol, Ethylhexylglycerin';

	test.each(['EU', 'GB', 'CH'] as const)('%s: nano in brackets', (market) => {
		expect(list(market).text).toBe(`Aqua, ${EU}, CI 77266 (nano), CI 77499`);
	});
	test.each(['AU', 'ASEAN'] as const)('%s: no mark for nano', (market) => {
		expect(list(market).text).toBe(`Aqua, ${EU}, CI 77266, CI 77499`);
	});
	test('United States', () => {
		const english = EU.replace('Cera Alba', 'Beeswax').replace(
			'Copernicia Cerifera Cera',
			'Copernicia Cerifera (Carnauba) Wax'
		);
		expect(namesIn(list('US'), 'ordered', 'free').join(', ')).toBe(`Water, ${english}`);
		expect(namesIn(list('US'), 'colourant').sort()).toEqual(['Black 2', 'Iron Oxides']);
	});
	test('Canada', () => {
		expect(list('CA').text).toBe(`Aqua/Water/Eau, ${EU}, CI 77266, CI 77499`);
	});
});

describe('an arrangement', () => {
	const [materials, lines] = single([
		['Aqua', '95'],
		['Glycerin', '3'],
		['Panthenol', '0.9'],
		['Allantoin', '0.6'],
		['CI 77891', '0.5', { use: 'colourant' }]
	]);
	const arranged = (market: Market, arrangement: string[]) =>
		shadedList([composed(materials, lines)], {
			market,
			stay: 'leave-on',
			batchDay: '2026-12-01' as IsoDate,
			substances: substancesOf(materials),
			allergens: [],
			names: NAME_BOOK,
			arrangement
		});

	test('moves what stands below 1 % freely', () => {
		const list = arranged('EU', ['Aqua', 'Glycerin', 'Allantoin', 'Panthenol', 'CI 77891']);
		expect(list.text).toBe('Aqua, Glycerin, Allantoin, Panthenol, CI 77891');
		expect(list.refused).toEqual([]);
	});
	test('is refused where a lighter name stands before a heavier one of the ordered part', () => {
		const list = arranged('EU', ['Aqua', 'Panthenol', 'Glycerin', 'Allantoin', 'CI 77891']);
		expect(list.refused).toMatchObject([{ name: 'Panthenol', before: 'Glycerin', because: 'weight' }]);
		expect(list.text).toBe('Aqua, Glycerin, Panthenol, Allantoin, CI 77891');
	});
	test('puts a colourant among the others only where the market allows it', () => {
		const order = ['Aqua', 'Glycerin', 'CI 77891', 'Panthenol', 'Allantoin'];
		expect(arranged('EU', order).refused).toMatchObject([
			{ name: 'CI 77891', before: 'Panthenol', because: 'colourantLast' },
			{ name: 'CI 77891', before: 'Allantoin', because: 'colourantLast' }
		]);
		expect(
			arranged(
				'CA',
				order.map((name) => name.replace('Aqua', 'Aqua/Water/Eau'))
			).refused
		).toEqual([]);
		const american = ['Titanium Dioxide', 'Water', 'Glycerin', 'Panthenol', 'Allantoin'];
		expect(arranged('US', american).text).toBe(american.join(', '));
	});
	test('keeps to its relative order when a name is gone or new', () => {
		expect(arranged('EU', ['Aqua', 'Glycerin', 'Allantoin', 'Urea', 'CI 77891']).text).toBe(
			'Aqua, Glycerin, Panthenol, Allantoin, CI 77891'
		);
	});
});
