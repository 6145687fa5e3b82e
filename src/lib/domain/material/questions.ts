import type { IsoDate } from '../quantity/units';

export const QUESTIONS = [
	'composition',
	'allergens',
	'impurities',
	'heavyMetals',
	'animalOrigin',
	'nano',
	'cmr',
	'animalTesting',
	'perfumeLimits'
] as const;
export type Question = (typeof QUESTIONS)[number];

/** What a material holds decides what its supplier is asked. */
export interface MaterialTraits {
	/** Perfume or aroma is among the constituents. */
	readonly fragrant: boolean;
	/** A constituent is used as a colourant. */
	readonly coloured: boolean;
}
export type AskedOf = 'all' | keyof MaterialTraits;

/**
 * Who is asked what. Common practice, no source: what most assessors ask of every raw material, of perfumes and of colourants.
 * No question stands for another, and what nobody answered never reads as absent.
 */
export const ASKED: Readonly<Record<Question, AskedOf>> = {
	composition: 'all',
	allergens: 'fragrant',
	impurities: 'all',
	heavyMetals: 'coloured',
	animalOrigin: 'all',
	nano: 'all',
	cmr: 'all',
	animalTesting: 'all',
	perfumeLimits: 'fragrant'
};

export const questionsFor = (traits: MaterialTraits): readonly Question[] =>
	QUESTIONS.filter((question) => {
		const of = ASKED[question];
		return of === 'all' || traits[of];
	});

/** Statements about allergens are written against a list: the one before Regulation (EU) 2023/1545 names fewer. */
export const ALLERGEN_LAWS = ['before-2023-1545', '2023-1545'] as const;
export type AllergenLaw = (typeof ALLERGEN_LAWS)[number];

export interface GivenAnswer {
	readonly question: Question;
	readonly law: AllergenLaw | null;
	readonly versionNumber: number;
	readonly goodUntil: string | null;
}

/** earlier: given for an earlier version, or against an earlier law. pastDate: its document no longer counts. */
export type AnswerStanding = 'given' | 'earlier' | 'pastDate' | 'notStated';

/**
 * How far an answer carries on a day. `sinceVersion` is the oldest version that says the same as the one asked about: an answer
 * given for it or a later one still speaks of this composition.
 */
export function answerStanding(answer: GivenAnswer | null, sinceVersion: number, day: IsoDate): AnswerStanding {
	if (!answer) return 'notStated';
	if (answer.goodUntil !== null && answer.goodUntil < day) return 'pastDate';
	if (answer.question === 'allergens' && answer.law !== '2023-1545') return 'earlier';
	return answer.versionNumber < sinceVersion ? 'earlier' : 'given';
}
