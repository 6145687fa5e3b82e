import type { Composition, Contribution, CompositionRow, WeighedMaterial, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import type { Id, IsoDate, Percent, Ratio } from '../quantity/units';

export type Market = 'EU' | 'GB' | 'US' | 'CA' | 'AU' | 'ASEAN' | 'CH';
export const MARKETS = ['EU', 'GB', 'US', 'CA', 'AU', 'ASEAN', 'CH'] as const satisfies readonly Market[];
export type Stay = 'leave-on' | 'rinse-off';

/** Who a substance is; `key` is substanceKey(inci). */
export interface SubstanceIdentity {
	readonly id: Id<'substance'>;
	readonly inci: string;
	readonly key: string;
	readonly cas: readonly string[];
	readonly colourIndex: string | null;
}

/** One row of the fragrance allergens; structurally the reference's rows. */
export interface AllergenEntry {
	readonly ruleId: string;
	readonly labelName: string;
	readonly members: readonly { readonly inci: string; readonly cas: readonly string[] }[];
	readonly leaveOnAbove: Percent;
	readonly rinseOffAbove: Percent;
	/** First batch day on which the entry must be named; null for entries of the older list. */
	readonly placedFrom: IsoDate | null;
	/** Where a market counts from the product's first sale: products first sold from this day must name it at once. */
	readonly firstSoldFrom?: IsoDate;
}

/** A colour additive as one market lists it; `form` is the salt that its number alone does not tell. */
export interface ColourName {
	readonly number: string;
	readonly suffix?: string | undefined;
	readonly form?: 'acid' | 'sodium' | 'calcium' | 'ammonium' | undefined;
	readonly short: string;
	readonly certified: boolean;
}
/** Names beyond the glossary, by substanceKey: common names of plants, trivial names of the EU with their INCI, listed colours. */
export interface NameBook {
	readonly plants: ReadonlyMap<string, string>;
	readonly technical: ReadonlyMap<string, { readonly technical: string; readonly inci: string }>;
	readonly colours: readonly ColourName[];
}
/** For markets that print nothing but glossary names and colour index numbers. */
export const GLOSSARY_ONLY: NameBook = { plants: new Map(), technical: new Map(), colours: [] };
/** Why a printed name is not certain: the salt is not told, or the market lists no such colour. */
export type NameDoubt =
	{ readonly kind: 'colourForm'; readonly candidates: readonly string[] } | { readonly kind: 'colourUnknown' };

export interface ListRequest {
	readonly market: Market;
	readonly stay: Stay;
	readonly batchDay: IsoDate;
	/** The day on which the product was or will be first sold; null when nobody has said. */
	readonly firstSold?: IsoDate | null;
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
	/** The allergen entries of this market; none where it names none. */
	readonly allergens: readonly AllergenEntry[];
	readonly names: NameBook;
	/** Carry-over that a recorded justification leaves out, as carryOverKey(substance, material). */
	readonly leftOutCarryOver?: ReadonlySet<string>;
	/** Printed names in the order that an officer wants; kept as a relative order (see arrangement.ts). */
	readonly arrangement?: readonly string[];
	/**
	 * How strictly it is judged. "whole": any unlawful place gives the usual order back. "kept": names whose place has become
	 * unlawful fall back to where weight puts them, the others stay; what is weak in the usual order is not held against it.
	 */
	readonly arrangementIs?: 'whole' | 'kept';
}
export const carryOverKey = (substance: Id<'substance'>, material: Id<'material'>) => `${substance}|${material}`;

export type ReasonCode =
	'descending' | 'belowOnePercent' | 'colourantLast' | 'mayContain' | 'nano' | 'allergen' | 'perfume' | 'name';
export type Reason =
	| { readonly kind: 'contribution'; readonly of: Contribution }
	| { readonly kind: 'rule'; readonly ruleId: string; readonly code: ReasonCode };

export type LeftOutReason =
	'impurity' | 'processingAid' | 'carryOver' | 'allergenAtOrBelow' | 'allergenNotYet' | 'namedByPerfume';
export interface LeftOut {
	readonly name: string;
	readonly substances: readonly Id<'substance'>[];
	readonly reason: LeftOutReason;
	readonly share: Estimate<Percent>;
	readonly ruleId: string;
	readonly limit: Percent | null;
}

export type Block = 'ordered' | 'free' | 'colourant' | 'mayContain';
export interface ListEntry {
	readonly name: string;
	readonly substances: readonly Id<'substance'>[];
	readonly rows: readonly CompositionRow[];
	readonly block: Block;
	readonly share: Estimate<Percent>;
	/** Named only because of a fragrance allergen entry. */
	readonly allergen: boolean;
	readonly why: readonly Reason[];
}

/** A printed name with the constituents that it stands for; what order strength compares. */
export interface PlacedName {
	readonly name: string;
	readonly share: Estimate<Percent>;
	readonly select: (part: WeighedPart) => boolean;
	/** The materials that can hold any of it, by composition; all of them where nothing is said. */
	readonly within?: ReadonlyMap<Composition, readonly WeighedMaterial[]>;
}
export type Strength = 'restsOnTypical' | 'undecided';
/** A pair printed before/after that some composition within the suppliers' ranges would print the other way round. */
export interface WeakPair {
	readonly before: string;
	readonly after: string;
	readonly strength: Strength;
	readonly turnsAt: {
		readonly material: Id<'material'>;
		readonly constituent: Id<'constituent'>;
		readonly substance: Id<'substance'>;
		readonly at: Ratio;
	} | null;
	readonly ask: Id<'material'> | null;
}
/** What cannot be told yet: a threshold that the ranges straddle, or a colour whose listed name depends on its salt. */
export type ListQuestion =
	| {
			readonly kind: 'allergen';
			readonly name: string;
			readonly share: Estimate<Percent>;
			readonly limit: Percent;
			readonly ruleId: string;
			readonly printed: boolean;
			readonly ask: Id<'material'> | null;
	  }
	| {
			readonly kind: 'colourName';
			readonly name: string;
			readonly doubt: NameDoubt;
			readonly ask: Id<'material'> | null;
	  };

/** A place that an arrangement must not give: the name, the one it was put before, and why that can be unlawful. */
export interface Refusal {
	readonly name: string;
	readonly before: string;
	readonly because: 'weight' | 'colourantLast' | 'mayContainLast';
	/** For weight: the pair, with the supplier's figure at which the order would be unlawful. */
	readonly pair: WeakPair | null;
}

export interface IngredientList {
	readonly market: Market;
	/** Decimals of every share in this list; the composition's own scale. */
	readonly shareDecimals: number;
	readonly entries: readonly ListEntry[];
	readonly text: string;
	readonly weak: readonly WeakPair[];
	readonly leftOut: readonly LeftOut[];
	readonly questions: readonly ListQuestion[];
	/** Places of the arrangement that were not given; the names stand where weight puts them. */
	readonly refused: readonly Refusal[];
}
