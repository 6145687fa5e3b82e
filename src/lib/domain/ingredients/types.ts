import type { Contribution, CompositionRow, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import type { Id, IsoDate, Percent, Ratio } from '../quantity/units';

export type ListMarket = 'EU';
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
}

export interface ListRequest {
	readonly market: ListMarket;
	readonly stay: Stay;
	readonly batchDay: IsoDate;
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
	readonly allergens: readonly AllergenEntry[];
}

export type ReasonCode = 'descending' | 'belowOnePercent' | 'colourantLast' | 'nano' | 'allergen' | 'perfume' | 'name';
export type Reason =
	| { readonly kind: 'contribution'; readonly of: Contribution }
	| { readonly kind: 'rule'; readonly ruleId: string; readonly code: ReasonCode };

export type LeftOutReason = 'impurity' | 'processingAid' | 'allergenAtOrBelow' | 'allergenNotYet' | 'namedByPerfume';
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
/** A threshold that the ranges straddle, so that it cannot be told yet whether a name is printed. */
export interface ThresholdQuestion {
	readonly kind: 'allergen';
	readonly name: string;
	readonly share: Estimate<Percent>;
	readonly limit: Percent;
	readonly ruleId: string;
	readonly printed: boolean;
	readonly ask: Id<'material'> | null;
}

export interface IngredientList {
	readonly market: ListMarket;
	/** Decimals of every share in this list; the composition's own scale. */
	readonly shareDecimals: number;
	readonly entries: readonly ListEntry[];
	readonly text: string;
	readonly weak: readonly WeakPair[];
	readonly leftOut: readonly LeftOut[];
	readonly questions: readonly ThresholdQuestion[];
}
