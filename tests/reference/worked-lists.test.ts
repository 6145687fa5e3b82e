import { describe, expect, test } from 'vitest';
import { formatRatio } from '../../src/lib/domain/quantity/ratio';
import type { Materials } from '../../src/lib/domain/testing/formula';
import { formula, listOf, namesIn, parts, pure, shareOf } from './support/list';

// Source of every expected list: the fact base, B.6 "Worked ingredient lists" (original formulas, arithmetic checked by script),
// after Regulation (EC) No 1223/2009, Art. 19(1)(g) and Annex III as amended by (EU) 2023/1545.
describe('formula 1: day cream, leave-on', () => {
	const materials: Materials = {
		water: pure('Aqua'),
		glycerin: parts(['Glycerin', '99.5'], ['Aqua', '0.5']),
		ester: pure('Caprylic/Capric Triglyceride'),
		emulsifier: parts(['Cetearyl Alcohol', '80'], ['Cetearyl Glucoside', '20']),
		shea: pure('Butyrospermum Parkii Butter'),
		blend: parts(['Propanediol', '60'], ['Aqua', '39'], ['Centella Asiatica Extract', '1']),
		preservative: parts(['Phenoxyethanol', '90'], ['Ethylhexylglycerin', '10']),
		hyaluronate: parts(['Aqua', '98.2'], ['Sodium Hyaluronate', '1'], ['Phenoxyethanol', '0.8']),
		xanthan: pure('Xanthan Gum'),
		antioxidant: parts(['Tocopherol', '70'], ['Helianthus Annuus Seed Oil', '30']),
		citric: parts(['Citric Acid', '50'], ['Aqua', '50']),
		perfume: [
			{ inci: 'Parfum', typical: '100' },
			...parts(
				['Linalool', '12'],
				['Limonene', '8'],
				['Citronellol', '1.5'],
				['Coumarin', '0.3'],
				['Geraniol', '0.2']
			).map((each) => ({ ...each, ofWhich: 'Parfum' }))
		]
	};
	const list = listOf(
		materials,
		formula(
			['water', '68.60'],
			['glycerin', '5.00'],
			['ester', '8.00'],
			['emulsifier', '5.00'],
			['shea', '4.00'],
			['blend', '5.00'],
			['preservative', '1.00'],
			['hyaluronate', '2.00'],
			['xanthan', '0.30'],
			['antioxidant', '0.50'],
			['citric', '0.20'],
			['perfume', '0.40']
		)
	);

	test('the ordered block, ties by name; exactly 1.0000 % is ordered', () => {
		expect(namesIn(list, 'ordered')).toEqual([
			'Aqua',
			'Caprylic/Capric Triglyceride',
			'Glycerin',
			'Butyrospermum Parkii Butter',
			'Cetearyl Alcohol',
			'Propanediol',
			'Cetearyl Glucoside'
		]);
		expect(shareOf(list, 'Cetearyl Glucoside')).toBe('1');
	});
	test('the free part; Coumarin at 0.0012 % is named, Geraniol at 0.0008 % is not', () => {
		expect(new Set(namesIn(list, 'free'))).toEqual(
			new Set([
				'Phenoxyethanol',
				'Parfum',
				'Tocopherol',
				'Xanthan Gum',
				'Helianthus Annuus Seed Oil',
				'Citric Acid',
				'Ethylhexylglycerin',
				'Centella Asiatica Extract',
				'Sodium Hyaluronate',
				'Citronellol',
				'Coumarin',
				'Limonene',
				'Linalool'
			])
		);
		expect(list.leftOut).toMatchObject([{ name: 'Geraniol', reason: 'allergenAtOrBelow' }]);
	});
	test.each([
		['Aqua', '72.639'],
		['Phenoxyethanol', '0.916'],
		['Linalool', '0.048'],
		['Limonene', '0.032'],
		['Citronellol', '0.006'],
		['Coumarin', '0.0012']
	])('%s sums to %s %%', (name, percent) => expect(shareOf(list, name)).toBe(percent));
	test('no place depends on a range', () => expect(list.weak).toEqual([]));
});

describe('formula 3: sun fluid with a nano dispersion', () => {
	const materials: Materials = {
		water: pure('Aqua'),
		mineral: [
			{ inci: 'Titanium Dioxide', typical: '40', nano: true, use: 'uvFilter' },
			...parts(
				['Caprylic/Capric Triglyceride', '48'],
				['Polyglyceryl-3 Polyricinoleate', '5'],
				['Alumina', '4'],
				['Stearic Acid', '3']
			)
		],
		uva: pure('Diethylamino Hydroxybenzoyl Hexyl Benzoate'),
		broad: pure('Bis-Ethylhexyloxyphenol Methoxyphenyl Triazine'),
		solvent: pure('Dibutyl Adipate'),
		emollient: pure('Dicaprylyl Carbonate'),
		alcohol: parts(['Alcohol', '96'], ['Aqua', '4']),
		glycerin: pure('Glycerin'),
		emulsifier: parts(['Polyglyceryl-6 Stearate', '75'], ['Polyglyceryl-6 Behenate', '25']),
		silica: pure('Silica'),
		preservative: parts(['Phenoxyethanol', '75'], ['Decylene Glycol', '25']),
		film: pure('VP/Hexadecene Copolymer'),
		tea: parts(['Aqua', '80'], ['Glycerin', '19'], ['Camellia Sinensis Leaf Extract', '1']),
		xanthan: pure('Xanthan Gum'),
		chelator: pure('Tetrasodium Glutamate Diacetate'),
		base: pure('Sodium Hydroxide')
	};
	const list = listOf(
		materials,
		formula(
			['water', '43.20'],
			['mineral', '15.00'],
			['uva', '5.00'],
			['broad', '3.00'],
			['solvent', '8.00'],
			['emollient', '5.00'],
			['alcohol', '6.00'],
			['glycerin', '4.00'],
			['emulsifier', '3.00'],
			['silica', '2.00'],
			['preservative', '1.20'],
			['film', '1.00'],
			['tea', '3.00'],
			['xanthan', '0.30'],
			['chelator', '0.20'],
			['base', '0.10']
		)
	);

	test('the ordered block', () => {
		expect(namesIn(list, 'ordered')).toEqual([
			'Aqua',
			'Dibutyl Adipate',
			'Caprylic/Capric Triglyceride',
			'Titanium Dioxide (nano)',
			'Alcohol',
			'Dicaprylyl Carbonate',
			'Diethylamino Hydroxybenzoyl Hexyl Benzoate',
			'Glycerin',
			'Bis-Ethylhexyloxyphenol Methoxyphenyl Triazine',
			'Polyglyceryl-6 Stearate',
			'Silica',
			'VP/Hexadecene Copolymer'
		]);
	});
	test('the free part', () => {
		expect(new Set(namesIn(list, 'free'))).toEqual(
			new Set([
				'Phenoxyethanol',
				'Polyglyceryl-3 Polyricinoleate',
				'Polyglyceryl-6 Behenate',
				'Alumina',
				'Stearic Acid',
				'Decylene Glycol',
				'Xanthan Gum',
				'Tetrasodium Glutamate Diacetate',
				'Sodium Hydroxide',
				'Camellia Sinensis Leaf Extract'
			])
		);
	});
	test.each([
		['Aqua', '45.84'],
		['Glycerin', '4.57'],
		['Titanium Dioxide (nano)', '6']
	])('%s sums to %s %%', (name, percent) => expect(shareOf(list, name)).toBe(percent));
});

describe('formula 4: tinted lip balm, shade A alone', () => {
	const paste = (pigment: string) => [
		{ inci: 'Ricinus Communis Seed Oil', typical: '50' },
		{ inci: pigment, typical: '50', use: 'colourant' as const }
	];
	const materials: Materials = {
		castor: pure('Ricinus Communis Seed Oil'),
		octyldodecanol: pure('Octyldodecanol'),
		candelilla: pure('Candelilla Cera'),
		shea: pure('Butyrospermum Parkii Butter'),
		beeswax: pure('Cera Alba'),
		carnauba: pure('Copernicia Cerifera Cera'),
		filler: parts(['Mica', '70'], ['Silica', '30']),
		aroma: [
			{ inci: 'Aroma', typical: '100' },
			...parts(['Vanillin', '20'], ['Benzyl Alcohol', '1.0'], ['Anethole', '0.1']).map((each) => ({
				...each,
				ofWhich: 'Aroma'
			}))
		],
		antioxidant: parts(['Tocopherol', '70'], ['Helianthus Annuus Seed Oil', '30']),
		white: paste('CI 77891'),
		red: paste('CI 77491')
	};
	const list = listOf(
		materials,
		formula(
			['castor', '30'],
			['octyldodecanol', '20'],
			['candelilla', '12'],
			['shea', '10'],
			['beeswax', '8'],
			['carnauba', '7'],
			['filler', '2'],
			['aroma', '0.5'],
			['antioxidant', '0.5'],
			['white', '6'],
			['red', '4']
		)
	);

	test('the ordered block; mica as filler keeps its name', () => {
		expect(namesIn(list, 'ordered')).toEqual([
			'Ricinus Communis Seed Oil',
			'Octyldodecanol',
			'Candelilla Cera',
			'Butyrospermum Parkii Butter',
			'Cera Alba',
			'Copernicia Cerifera Cera',
			'Mica'
		]);
		expect(shareOf(list, 'Ricinus Communis Seed Oil')).toBe('35');
	});
	test('the free part and the colourants; Anethole at 0.0005 % is not named', () => {
		expect(new Set(namesIn(list, 'free'))).toEqual(
			new Set(['Silica', 'Aroma', 'Tocopherol', 'Helianthus Annuus Seed Oil', 'Benzyl Alcohol', 'Vanillin'])
		);
		expect(namesIn(list, 'colourant')).toEqual(['CI 77491', 'CI 77891']);
		expect(list.leftOut).toMatchObject([{ name: 'Anethole', reason: 'allergenAtOrBelow' }]);
	});
	test.each([
		['CI 77891', '3'],
		['CI 77491', '2'],
		['Vanillin', '0.1'],
		['Benzyl Alcohol', '0.005']
	])('%s sums to %s %%', (name, percent) => expect(shareOf(list, name)).toBe(percent));
});

describe('formula 5: serum whose order depends on a supplier’s range', () => {
	const materials: Materials = {
		water: pure('Aqua'),
		niacinamide: pure('Niacinamide'),
		panthenol: parts(['Panthenol', '75'], ['Aqua', '25']),
		peptide: [
			{ inci: 'Glycerin', min: '50', max: '60' },
			{ inci: 'Aqua' },
			{ inci: 'Palmitoyl Tripeptide-1', min: '0.01', max: '0.1' },
			{ inci: 'Hydroxyethylcellulose', typical: '0.4' }
		],
		butylene: pure('Butylene Glycol'),
		betaine: pure('Betaine'),
		pentylene: pure('Pentylene Glycol'),
		pca: pure('Sodium PCA'),
		phenoxyethanol: pure('Phenoxyethanol'),
		hec: pure('Hydroxyethylcellulose'),
		hyaluronate: parts(['Sodium Hyaluronate', '95'], ['Aqua', '5']),
		edta: pure('Disodium EDTA'),
		lactic: parts(['Lactic Acid', '90'], ['Aqua', '10'])
	};
	const list = listOf(
		materials,
		formula(
			['water', '79.30'],
			['niacinamide', '5.00'],
			['panthenol', '3.00'],
			['peptide', '4.00'],
			['butylene', '3.00'],
			['betaine', '2.00'],
			['pentylene', '1.00'],
			['pca', '1.00'],
			['phenoxyethanol', '0.80'],
			['hec', '0.50'],
			['hyaluronate', '0.20'],
			['edta', '0.10'],
			['lactic', '0.10']
		)
	);

	test('the list at the derived typicals', () => {
		expect(namesIn(list, 'ordered')).toEqual([
			'Aqua',
			'Niacinamide',
			'Butylene Glycol',
			'Panthenol',
			'Glycerin',
			'Betaine',
			'Pentylene Glycol',
			'Sodium PCA'
		]);
		expect(new Set(namesIn(list, 'free'))).toEqual(
			new Set([
				'Phenoxyethanol',
				'Hydroxyethylcellulose',
				'Sodium Hyaluronate',
				'Disodium EDTA',
				'Lactic Acid',
				'Palmitoyl Tripeptide-1'
			])
		);
		expect(shareOf(list, 'Glycerin')).toBe('2.2');
		expect(shareOf(list, 'Panthenol')).toBe('2.25');
	});
	test('one weak pair, undecided, that turns at 56.25 % glycerin in the peptide blend; its supplier is asked', () => {
		expect(list.weak).toHaveLength(1);
		const [pair] = list.weak;
		expect(pair).toMatchObject({ before: 'Panthenol', after: 'Glycerin', strength: 'undecided', ask: 'peptide' });
		expect(pair?.turnsAt).toMatchObject({ material: 'peptide', substance: 'glycerin' });
		expect(pair?.turnsAt && formatRatio(pair.turnsAt.at, 8, 0, 'nearest')).toBe('56.25');
	});
	test('the peptide is at most 0.004 % in the product', () => {
		const peptide = list.entries.find((entry) => entry.name === 'Palmitoyl Tripeptide-1');
		expect(peptide?.share.high).toBe(40_000_000_000_000n);
	});
});
