import type { Estimate, Range } from '../quantity/range';
import type { Id, IsoDate, PartShare, Sha256 } from '../quantity/units';

/** Decides the name (CI 77891 or Titanium Dioxide) and the place; one substance may stand twice in a list. */
export type Use = 'colourant' | 'uvFilter' | 'hairDye' | 'preservative' | 'other';
export type PartRole = 'ingredient' | 'carryOver' | 'impurity' | 'processingAid';

/** What the supplier wrote. Null is "not stated": without any figure a constituent lies between 0 and 100. */
export interface Declared {
	readonly low: PartShare | null;
	readonly typical: PartShare | null;
	readonly high: PartShare | null;
	readonly highOpen: boolean;
}

export type Constituent = {
	readonly id: Id<'constituent'>;
	readonly substance: Id<'substance'>;
	readonly declared: Declared;
	readonly nano: boolean;
	readonly use: Use;
	readonly source: { readonly document: Id<'document'>; readonly page: number | null } | null;
} & (
	| { readonly place: 'inSum'; readonly role: PartRole }
	/** Inside its parent (an allergen inside a perfume); the figure is a share of the material, not of the parent. */
	| { readonly place: 'ofWhich'; readonly parent: Id<'constituent'> }
);

export interface MaterialVersion {
	readonly id: Id<'materialVersion'>;
	readonly material: Id<'material'>;
	readonly number: number;
	readonly effectiveFrom: IsoDate | null;
	readonly constituents: readonly Constituent[];
	readonly contentHash: Sha256 | null;
}

export interface ResolvedPart {
	readonly of: Constituent;
	readonly share: Estimate<PartShare>;
}
/** Tightened by the sum; the only form that composition accepts. */
export interface ResolvedMaterial {
	readonly version: Id<'materialVersion'>;
	readonly material: Id<'material'>;
	readonly parts: readonly ResolvedPart[];
}

export type MaterialFault =
	| { readonly kind: 'noConstituents' }
	| { readonly kind: 'minimaAbove100'; readonly by: PartShare }
	| { readonly kind: 'maximaBelow100'; readonly by: PartShare }
	| { readonly kind: 'rangeUpsideDown'; readonly at: Id<'constituent'> }
	| { readonly kind: 'typicalOutsideRange'; readonly at: Id<'constituent'>; readonly range: Range<PartShare> }
	| { readonly kind: 'typicalsOffBy'; readonly by: PartShare }
	| { readonly kind: 'parentUnknown'; readonly at: Id<'constituent'> }
	| { readonly kind: 'partsAboveParent'; readonly parent: Id<'constituent'>; readonly by: PartShare };
