/** The label copy of one pack and one market: the words, and what stands in the way of printing them. */

/** Items of Art. 19(1) and what a pack carries beside them, in the order of the table "What stands where". */
export const LABEL_ELEMENTS = [
	'brand',
	'name',
	'function',
	'nominalContent',
	'directions',
	'precautions',
	'ingredients',
	'durability',
	'batch',
	'responsiblePerson',
	'origin'
] as const;
export type LabelElement = (typeof LABEL_ELEMENTS)[number];

export const CONTENT_UNITS = ['ml', 'g'] as const;
export type ContentUnit = (typeof CONTENT_UNITS)[number];

/** `months` of a best-before date count from filling and are not printed; those after opening are. */
export type Durability =
	| { readonly kind: 'bestBefore'; readonly months: number }
	| { readonly kind: 'periodAfterOpening'; readonly months: number }
	| { readonly kind: 'notNeeded'; readonly reason: string };

export interface NominalContent {
	/** An exact decimal with a point, without trailing zeros. */
	readonly size: string;
	readonly unit: ContentUnit;
	/** The mark of Directive 76/211/EEC beside the figure. */
	readonly eMark: boolean;
}

/** Everything that a copy says. Frozen and hashed as it stands from review on; an empty text is an absent element. */
export interface LabelContent {
	/** Raised when the shape changes, so that an old hash can still be worked out from its text. */
	readonly form: 1;
	readonly brand: string;
	readonly name: string;
	readonly function: string;
	readonly content: NominalContent;
	readonly directions: string;
	readonly precautions: string;
	/** The list's text, read from the composition and never typed; empty while the copy is a draft. */
	readonly ingredients: string;
	/** Null while nobody has chosen. */
	readonly durability: Durability | null;
	/** Where the batch is printed, in words; the batch itself comes at filling. */
	readonly batch: string;
	readonly responsible: { readonly name: string; readonly address: string };
	/** An imported product names its country of origin. */
	readonly imported: boolean;
	readonly origin: string;
}

export interface ElementRow {
	readonly element: LabelElement;
	/** The words on the pack; null where there are none. */
	readonly text: string | null;
	/** Id of the rule that asks for it; null where only the house does. */
	readonly ruleId: string | null;
	/** False where this pack is exempt or nothing asks for the element. */
	readonly required: boolean;
	readonly missing: boolean;
}

/** How the ingredient list stands that the copy would print. */
export type ListStanding =
	| { readonly kind: 'nothingReleased' | 'contradictory' | 'beingRechecked' }
	| {
			readonly kind: 'list';
			readonly text: string;
			readonly weak: readonly { readonly before: string; readonly after: string }[];
			/** Thresholds that the ranges straddle; figures in % as text. */
			readonly questions: readonly {
				readonly name: string;
				readonly low: string;
				readonly high: string;
				readonly limit: string;
			}[];
	  };

/** Refuses review and approval. */
export type CopyFault =
	| { readonly kind: 'missing'; readonly element: LabelElement }
	| { readonly kind: 'nothingReleased' | 'contradictory' | 'beingRechecked' }
	| { readonly kind: 'orderDependsOnRange'; readonly before: string; readonly after: string }
	| { readonly kind: 'eMarkOutsideScope'; readonly size: string; readonly unit: ContentUnit };

/** Lets the copy pass, with a recorded reason. */
export interface CopyQuestion {
	readonly kind: 'threshold';
	readonly name: string;
	readonly low: string;
	readonly high: string;
	readonly limit: string;
}

export interface CopyJudgement {
	readonly faults: readonly CopyFault[];
	readonly questions: readonly CopyQuestion[];
}
