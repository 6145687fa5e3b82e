import type { CompositionRowPrint, LabelCopyData, ProductFileData, SectionPrint, SourcePrint } from '../types';

/** An invented product whose composition sums to 100; for tests and for looking at the pages. */
const source = (name: string, detail: string): SourcePrint => ({ name, detail });

export const SOURCES: readonly SourcePrint[] = [
	source('Process water', 'Site water plan, 12 Jan 2026'),
	source('Glycerin 99.5', 'Statement, Selby Oils, 4 Mar 2025'),
	source('Quillex Centella 1', 'Statement, Quillstone, 3 Feb 2026'),
	source('Niacarrow N', 'Statement, Thornby, 30 Jun 2025'),
	source('Xanthar T', 'Statement, Thornby, 30 Jun 2025'),
	source('Oleavant CT 60', 'Statement, Selby Oils, 22 May 2025'),
	source('Brackmul GA-20', 'Statement rev. 4, Brackwater, 12 Mar 2024'),
	source('Hydrathen H1', 'Statement, Ostrel, 18 Sep 2024'),
	source('Oleavant Karra soft', 'Statement, Selby Oils, 22 May 2025'),
	source('Squalvane O', 'Statement rev. 2, Selby Oils, 22 May 2025'),
	source('Cetarrow 1618', 'Statement, Brackwater, 12 Mar 2024'),
	source('Wardol 90', 'Statement, Thornby, 30 Jun 2025'),
	source('Retivar 15', 'Statement rev. 2, Quillstone, 3 Feb 2026'),
	source('Tocovar 70', 'Statement, Quillstone, 3 Feb 2026'),
	source('Meadow Rain 4417', 'Allergen list, Pargeter & Moss, 9 Feb 2026'),
	source('Citric acid 50 %', 'Statement, Thornby, 30 Jun 2025')
];

type Line = readonly [number | null, string, string, string, string, string, readonly number[]];

const LINES: readonly Line[] = [
	[1, 'Aqua', '7732-18-5', 'solvent', '66.0390', '65.789–66.289', [0, 1, 2, 7, 15]],
	[2, 'Caprylic/Capric Triglyceride', '73398-61-5', 'emollient', '8.0000', '', [5]],
	[3, 'Glycerin', '56-81-5', 'humectant', '4.9750', '', [1]],
	[4, 'Butyrospermum Parkii Butter', '194043-92-0', 'emollient', '4.6000', '', [8]],
	[5, 'Cetearyl Alcohol', '67762-27-0', 'emulsion stabilising', '4.6000', '4.350–4.850', [6, 10]],
	[6, 'Propanediol', '504-63-2', 'solvent', '3.0000', '2.750–3.250', [2]],
	[7, 'Squalane', '111-01-3', 'emollient', '2.8000', '', [9]],
	[8, 'Niacinamide', '98-92-0', 'skin conditioning', '2.0000', '', [3]],
	[9, 'Cetearyl Glucoside', '246159-33-1', 'emulsifying', '1.0000', '0.750–1.250', [6]],
	[10, 'Phenoxyethanol', '122-99-6', 'preservative', '0.9160', '', [7, 11]],
	[11, 'Helianthus Annuus Seed Oil', '8001-21-6', 'emollient', '0.6570', '', [12, 13]],
	[12, 'Parfum, Meadow Rain 4417', 'mixture', 'perfuming', '0.4000', '', [14]],
	[null, 'of which Linalool', '78-70-6', '', '0.0480', '', [14]],
	[null, 'of which Limonene', '5989-27-5', '', '0.0320', '', [14]],
	[null, 'of which Linalyl Acetate', '115-95-7', '', '0.0120', '', [14]],
	[null, 'of which Citronellol', '106-22-9', '', '0.0060', '', [14]],
	[null, 'of which Coumarin', '91-64-5', '', '0.0012', '', [14]],
	[null, 'of which Geraniol', '106-24-1', '', '0.0008', '', [14]],
	[13, 'Tocopherol', '10191-41-0', 'antioxidant', '0.3530', '', [12, 13]],
	[14, 'Xanthan Gum', '11138-66-2', 'viscosity controlling', '0.3000', '', [4]],
	[15, 'Citric Acid', '77-92-9', 'buffering', '0.1000', '', [15]],
	[16, 'Ethylhexylglycerin', '70445-33-9', 'skin conditioning', '0.1000', '', [11]],
	[17, 'Retinyl Palmitate', '79-81-2', 'skin conditioning', '0.0900', '', [12]],
	[18, 'Centella Asiatica Extract', '84696-21-9', 'skin conditioning', '0.0500', '', [2]],
	[19, 'Sodium Hyaluronate', '9067-32-7', 'humectant', '0.0200', '', [7]]
];

export const COMPOSITION_ROWS: readonly CompositionRowPrint[] = LINES.map(
	([number, name, cas, role, share, range, sources]) => ({ number, name, cas, function: role, share, range, sources })
);

export const LIST_NAMES = [
	'Aqua',
	'Caprylic/Capric Triglyceride',
	'Glycerin',
	'Butyrospermum Parkii Butter',
	'Cetearyl Alcohol',
	'Propanediol',
	'Squalane',
	'Niacinamide',
	'Cetearyl Glucoside',
	'Phenoxyethanol',
	'Helianthus Annuus Seed Oil',
	'Parfum',
	'Tocopherol',
	'Xanthan Gum',
	'Citric Acid',
	'Ethylhexylglycerin',
	'Retinyl Palmitate',
	'Centella Asiatica Extract',
	'Sodium Hyaluronate',
	'Citronellol',
	'Coumarin',
	'Limonene',
	'Linalool',
	'Linalyl Acetate'
] as const;

const UNDECIDED = new Set<string>(['Butyrospermum Parkii Butter', 'Cetearyl Alcohol']);
const HASH = '9f2c41d07ab35e88c1604be2d7f39a10583cc6e4fb21907d5ae8360b7f14d2c9';
const FORMULA = { code: 'F-0012', version: 7, basis: 2, released: '24 Nov 2026' } as const;
const RULES = 'Reg. (EC) 1223/2009, rule book EU 2026.11';

export const DRAFT_COPY: LabelCopyData = {
	language: 'en',
	productName: 'Nightfold Cream',
	brandName: 'Pell & Fennick',
	clientName: 'Pell & Fennick Ltd',
	packName: 'Carton, 50 ml',
	marketName: 'European Union',
	state: 'draft',
	outOfDate: null,
	number: null,
	contentHash: null,
	formula: FORMULA,
	rules: RULES,
	madeOn: '1 Dec 2026, 14:20',
	compiledBy: 'Ines Marlow, Wendmoor Laboratories',
	inUseFrom: null,
	elements: [
		{ element: 'brand', text: 'Pell & Fennick', requiredBy: '', prescribed: false },
		{ element: 'name', text: 'Nightfold', requiredBy: '', prescribed: false },
		{ element: 'function', text: 'Night face cream', requiredBy: 'Art. 19(1)(f)', prescribed: false },
		{ element: 'nominalContent', text: '50 ml ℮', requiredBy: 'Art. 19(1)(b)', prescribed: false },
		{
			element: 'directions',
			text: 'Smooth over clean face and neck in the evening. Avoid the eye area.',
			requiredBy: 'Annex I, B 2',
			prescribed: false
		},
		{
			element: 'precautions',
			text: 'Contains Vitamin A. Consider your daily intake before use.',
			requiredBy: 'Annex III, 376',
			prescribed: true
		},
		{ element: 'periodAfterOpening', text: 'open jar, 12M', requiredBy: 'Art. 19(1)(c)', prescribed: false },
		{
			element: 'responsiblePerson',
			text: 'Pell & Fennick Ltd, 7 Example Quay, Dublin, Ireland',
			requiredBy: 'Art. 19(1)(a)',
			prescribed: false
		},
		{ element: 'origin', text: null, requiredBy: 'Art. 19(1)(a)', prescribed: false },
		{ element: 'batch', text: 'printed at filling', requiredBy: 'Art. 19(1)(e)', prescribed: false }
	],
	list: {
		heading: 'Ingredients',
		names: LIST_NAMES.map((name) => ({ name, undecided: UNDECIDED.has(name) })),
		mayContain: [],
		requiredBy: 'Art. 19(1)(g)'
	},
	open: [
		'Butyrospermum Parkii Butter and Cetearyl Alcohol: the order is undecided.',
		'The country of origin is missing: the product is imported.',
		'The directions are not yet in Part B 2.'
	],
	approvals: []
};

export const APPROVED_COPY: LabelCopyData = {
	...DRAFT_COPY,
	state: 'approvedByClient',
	number: 3,
	contentHash: HASH,
	elements: DRAFT_COPY.elements.map((row) =>
		row.element === 'origin' ? { ...row, text: 'Made in Great Britain' } : row
	),
	list: { ...DRAFT_COPY.list, names: LIST_NAMES.map((name) => ({ name, undecided: false })) },
	open: [],
	approvals: [
		{ role: 'laboratory', decision: 'approved', name: 'Ines Marlow', date: '27 Nov 2026', comment: null },
		{
			role: 'client',
			decision: 'approved',
			name: 'Tobias Fenn',
			date: '30 Nov 2026',
			comment: 'Agreed for the second print run.'
		}
	]
};

const SECTIONS: readonly SectionPrint[] = [
	{
		section: 'description',
		readiness: 'ready',
		openWords: '',
		needs: [
			{
				item: 'Name, function and pack in every market',
				law: 'Art. 11(2)(a)',
				answer: 'held',
				words: 'Product record and label copy 3'
			},
			{ item: 'Formula code', law: 'Art. 11(2)(a)', answer: 'held', words: 'F-0012, version 7' }
		],
		blocks: [
			{
				kind: 'facts',
				rows: [
					{ label: 'Name', value: 'Nightfold Cream' },
					{ label: 'Brand', value: 'Pell & Fennick' },
					{ label: 'Function', value: 'Night face cream, leave-on' },
					{ label: 'Pack', value: 'Glass jar with liner, 50 ml; carton' },
					{ label: 'Formula code', value: 'F-0012' },
					{ label: 'Markets', value: 'European Union' }
				]
			}
		]
	},
	{
		section: 'a1',
		readiness: 'outOfDate',
		openWords: 'affirmed for formula 6',
		needs: [
			{ item: 'Released formula', law: 'Annex I, A 1', answer: 'held', words: 'F-0012, version 7, basis 2' },
			{ item: 'Composition document of every material', law: 'Annex I, A 1', answer: 'held', words: '16 of 16' },
			{
				item: 'Affirmation by the assessor',
				law: 'Annex I, A 1',
				answer: 'outOfDate',
				words: 'Given for formula 6; formula 7 raised Squalane.'
			}
		],
		blocks: []
	},
	{
		section: 'a2',
		readiness: 'incomplete',
		openWords: '1 report missing',
		needs: [
			{ item: 'Stability report on this formula', law: 'Annex I, A 2', answer: 'held', words: 'Stability ST-0118' },
			{
				item: 'Specification of the product',
				law: 'Annex I, A 2',
				answer: 'missing',
				words: 'Attach the specification under Evidence and link it here.'
			}
		],
		blocks: [
			{
				kind: 'table',
				title: 'Stability at 40 °C',
				columns: [
					{ head: 'Property', kind: 'text', weight: 3 },
					{ head: 'Method', kind: 'code', weight: 2 },
					{ head: 'Start', kind: 'number', weight: 1 },
					{ head: '3 months', kind: 'number', weight: 1 }
				],
				rows: [
					['pH', 'WM-021', '5.4', '5.3'],
					['Viscosity, Pa·s', 'WM-034', '28.1', '26.7'],
					['Droplet size, d90, µm', 'WM-040', '≤ 12', '≤ 12']
				]
			}
		]
	},
	{
		section: 'b4',
		readiness: 'incomplete',
		openWords: 'not signed',
		needs: [
			{
				item: 'Signature of the assessor',
				law: 'Art. 10(2)',
				answer: 'missing',
				words: 'Part B has not been signed for formula 7.'
			}
		],
		blocks: []
	},
	{
		section: 'method',
		readiness: 'ready',
		openWords: '',
		needs: [{ item: 'Method of manufacture', law: 'Art. 11(2)(c)', answer: 'held', words: 'Method of formula 7' }],
		blocks: [
			{ kind: 'subheading', text: 'Water phase' },
			{
				kind: 'steps',
				steps: [
					'Charge process water and glycerin; disperse xanthan gum at high shear until free of lumps.',
					'Heat to 75 °C; hold for not more than 30 minutes.',
					'Emulsify at 75 °C for 8 minutes, then cool while stirring slowly. Add the perfume below 40 °C.'
				]
			},
			{ kind: 'note', text: 'Common practice, not law: the preservative is in before the water phase stands.' }
		]
	},
	{
		section: 'practice',
		readiness: 'ready',
		openWords: '',
		needs: [
			{
				item: 'Statement of good manufacturing practice',
				law: 'Art. 8',
				answer: 'held',
				words: 'Practice statement, Wendmoor'
			}
		],
		blocks: []
	},
	{
		section: 'effect',
		readiness: 'incomplete',
		openWords: '1 claim not answered',
		needs: [
			{
				item: 'An answer to each criterion for every claim',
				law: 'Art. 20, Reg. 655/2013',
				answer: 'missing',
				words: '“Softens overnight”: fairness is not answered.'
			}
		],
		blocks: []
	},
	{
		section: 'animalTesting',
		readiness: 'ready',
		openWords: '',
		needs: [
			{
				item: 'Statement of manufacturer and suppliers',
				law: 'Art. 11(2)(e)',
				answer: 'notApplicable',
				words: 'No test was made or commissioned; Ines Marlow, 24 Nov 2026.'
			}
		],
		blocks: []
	}
];

const TITLES: readonly (readonly [string, string, number | null, string])[] = [
	['Challenge test CT-0931', 'Preservative efficacy', 4, '2 Sep 2026'],
	['Stability ST-0118', 'Stability report', 5, '14 Oct 2026'],
	['Jar and liner PC-0077', 'Packaging statement', 2, '11 Aug 2026'],
	['Composition statement BW-GA20, rev. 4', 'Composition document', 1, '12 Mar 2024'],
	['Moisturising HY-2211', 'Instrumental study', 4, '20 Oct 2026'],
	['Practice statement, Wendmoor', 'Statement', 1, '5 Jan 2026'],
	['Perfume certificate, encrypted', 'Certificate', null, 'undated']
];

export const PRODUCT_FILE: ProductFileData = {
	language: 'en',
	productName: 'Nightfold Cream',
	subtitle: 'Night face cream, leave-on, 50 ml glass jar',
	responsiblePerson: { name: 'Pell & Fennick Ltd', address: '7 Example Quay, Dublin, Ireland' },
	compiledBy: { organisation: 'Wendmoor Laboratories', person: 'Ines Marlow, regulatory officer' },
	formula: FORMULA,
	rules: RULES,
	inUse: 'from batch 26-131',
	kept: 'ten years after the last batch is placed, at the address above',
	issue: { kind: 'trial', number: 4, date: '1 Dec 2026' },
	sections: SECTIONS,
	composition: {
		lead: 'Formula 7 as added. 16 materials, 19 substances, 6 constituents of the perfume. Ranges come from suppliers’ statements, narrowed by the sum; safety is judged at the high end.',
		rows: COMPOSITION_ROWS,
		sum: '100.0000',
		sources: SOURCES,
		notes: ['Typical 4.600 and 1.000 in g are derived: the supplier states none.']
	},
	claims: [
		{
			wording: 'Softens overnight',
			usedOn: 'carton, web',
			answers: {
				legalCompliance: 'No approval is implied and no legal minimum is sold as a benefit.',
				truthfulness: 'Measured on the product itself, formula 7.',
				evidentialSupport: 'HY-2211: 24 people, 8 hours, rise of skin hydration against untreated skin, p < 0.01.',
				honesty: 'The time is stated; the mean is used and not the best responder.',
				fairness: null,
				informedDecision: 'Plain words; the average user understands “overnight” as about eight hours.'
			},
			evidence: ['Moisturising HY-2211, 20 Oct 2026']
		}
	],
	copies: [APPROVED_COPY, { ...DRAFT_COPY, packName: 'Jar, 50 ml' }],
	evidence: TITLES.map(([title, kind, pages, dated], index) => ({
		title,
		kind,
		sha256: HASH.slice(index) + HASH.slice(0, index),
		pages,
		dated,
		note: pages === null ? 'kept, cannot be bound' : ''
	}))
};

/** A file of at least the given number of pages: a long table of invented toxicological values in A 8. */
export function longFile(rows: number): ProductFileData {
	const table = {
		kind: 'table' as const,
		title: 'Invented values',
		columns: [
			{ head: 'Substance', kind: 'text' as const, weight: 3 },
			{ head: 'CAS', kind: 'code' as const, weight: 2 },
			{ head: 'Endpoint', kind: 'text' as const, weight: 4 },
			{ head: 'mg/kg bw/d', kind: 'number' as const, weight: 2 }
		],
		rows: Array.from({ length: rows }, (_, index) => [
			`Substance ${index + 1}`,
			'7732-18-5',
			'Repeated dose, 90 days, oral, rat; no adverse effect at the highest dose',
			`≥ ${index + 1}`
		])
	};
	const profile: SectionPrint = { section: 'a8', readiness: 'ready', openWords: '', needs: [], blocks: [table] };
	return { ...PRODUCT_FILE, sections: [...PRODUCT_FILE.sections, profile] };
}
