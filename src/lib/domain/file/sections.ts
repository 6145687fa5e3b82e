/** The sections of the file in their order: a1 to a10 are the headings of Part A, b1 to b4 those of Part B. */
export const SECTIONS = [
	'description',
	'a1',
	'a2',
	'a3',
	'a4',
	'a5',
	'a6',
	'a7',
	'a8',
	'a9',
	'a10',
	'b1',
	'b2',
	'b3',
	'b4',
	'method',
	'practice',
	'effect',
	'animalTesting'
] as const;
export type Section = (typeof SECTIONS)[number];

/** Where a needed item comes from, and with that where it is supplied. */
export type NeedSource =
	| { readonly kind: 'releasedFormula' }
	| { readonly kind: 'approvedCopy' }
	| { readonly kind: 'supportedClaims' }
	/** A document of this kind for every material of the formula. */
	| { readonly kind: 'everyMaterial'; readonly document: string }
	/** A document of the product, filed for this need; `onFormula`: it stops counting when another formula version answers. */
	| { readonly kind: 'productDocument'; readonly document: string; readonly onFormula: boolean };

export interface Need {
	readonly key: string;
	readonly section: Section;
	readonly source: NeedSource;
	readonly ruleId: string;
}

const RULE_OF: Readonly<Record<Section, string>> = {
	description: 'eu-1223-2009/art-11-2-a',
	a1: 'eu-1223-2009/annex-i-a-1',
	a2: 'eu-1223-2009/annex-i-a-2',
	a3: 'eu-1223-2009/annex-i-a-3',
	a4: 'eu-1223-2009/annex-i-a-4',
	a5: 'eu-1223-2009/annex-i-a-5',
	a6: 'eu-1223-2009/annex-i-a-6',
	a7: 'eu-1223-2009/annex-i-a-7',
	a8: 'eu-1223-2009/annex-i-a-8',
	a9: 'eu-1223-2009/annex-i-a-9',
	a10: 'eu-1223-2009/annex-i-a-10',
	b1: 'eu-1223-2009/annex-i-b-1',
	b2: 'eu-1223-2009/annex-i-b-2',
	b3: 'eu-1223-2009/annex-i-b-3',
	b4: 'eu-1223-2009/annex-i-b-4',
	method: 'eu-1223-2009/art-11-2-c',
	practice: 'eu-1223-2009/art-8',
	effect: 'eu-1223-2009/art-11-2-d',
	animalTesting: 'eu-1223-2009/art-11-2-e'
};

const need = (section: Section, name: string, source: NeedSource): Need => ({
	key: `${section}.${name}`,
	section,
	source,
	ruleId: RULE_OF[section]
});
const onFormula = (document: string): NeedSource => ({ kind: 'productDocument', document, onFormula: true });
const ofProduct = (document: string): NeedSource => ({ kind: 'productDocument', document, onFormula: false });
const everyMaterial = (document: string): NeedSource => ({ kind: 'everyMaterial', document });

/**
 * What each section needs. Source: Regulation (EC) 1223/2009, Art. 11(2) and Annex I; which document answers a heading is
 * common practice.
 */
export const NEEDS: readonly Need[] = [
	need('description', 'formula', { kind: 'releasedFormula' }),
	need('description', 'copy', { kind: 'approvedCopy' }),
	need('a1', 'formula', { kind: 'releasedFormula' }),
	need('a1', 'statements', everyMaterial('composition')),
	need('a2', 'stability', onFormula('stabilityReport')),
	need('a2', 'specification', ofProduct('specification')),
	need('a3', 'challenge', onFormula('challengeTest')),
	need('a3', 'limits', ofProduct('microbialLimits')),
	need('a4', 'impurities', everyMaterial('impurityStatement')),
	need('a4', 'packaging', ofProduct('packagingStatement')),
	need('a5', 'use', { kind: 'approvedCopy' }),
	need('a6', 'exposure', ofProduct('other')),
	need('a7', 'doses', onFormula('other')),
	need('a8', 'profiles', everyMaterial('toxicologicalProfile')),
	need('a9', 'effects', ofProduct('undesirableEffects')),
	need('a10', 'information', ofProduct('other')),
	need('b1', 'conclusion', onFormula('other')),
	need('b2', 'warnings', onFormula('other')),
	need('b3', 'reasoning', onFormula('other')),
	need('b4', 'qualification', ofProduct('assessorQualification')),
	need('method', 'method', onFormula('manufacturingMethod')),
	need('practice', 'statement', ofProduct('goodManufacturingPractice')),
	need('effect', 'claims', { kind: 'supportedClaims' }),
	need('animalTesting', 'statements', everyMaterial('animalTestingStatement'))
];

export const needOf = (key: string): Need | undefined => NEEDS.find((each) => each.key === key);
