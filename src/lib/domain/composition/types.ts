import type { MaterialFault, MaterialVersion, PartRole, Use } from '../material/types';
import type { Estimate } from '../quantity/range';
import type { Id, LineShare, PartShare, Percent } from '../quantity/units';

export type LineAmount =
	| {
			readonly kind: 'share';
			readonly min: LineShare | null;
			readonly share: LineShare;
			readonly max: LineShare | null;
	  }
	| { readonly kind: 'qs' };

/** A line names a material or another formula, not a version: the caller's basis says which version answers. */
export type FormulaLine = {
	readonly id: Id<'line'>;
	readonly phase: string;
	readonly amount: LineAmount;
} & (
	| { readonly material: Id<'material'>; readonly formula?: undefined }
	| { readonly formula: Id<'formula'>; readonly material?: undefined }
);

export interface FormulaVersionLines {
	readonly formula: Id<'formula'>;
	readonly version: Id<'formulaVersion'>;
	readonly lines: readonly FormulaLine[];
}

export interface CompositionRequest {
	readonly formula: Id<'formula'>;
	readonly formulas: ReadonlyMap<Id<'formula'>, FormulaVersionLines>;
	readonly materials: ReadonlyMap<Id<'material'>, MaterialVersion>;
}

/** One weighed line's part in a row. Figures stand on the composition's own scale (see Composition). */
export interface Contribution {
	/** From the outer formula's line to the line that weighs the material. */
	readonly path: readonly Id<'line'>[];
	readonly formulas: readonly Id<'formula'>[];
	readonly material: Id<'material'>;
	readonly materialVersion: Id<'materialVersion'>;
	readonly constituent: Id<'constituent'>;
	readonly ofWhich: boolean;
	readonly role: PartRole | 'ofWhich';
	/** The line's share of the whole formula: typical, and lowest and highest where a range line moves it. */
	readonly weight: Estimate<Weight>;
	readonly part: Estimate<PartShare>;
	readonly share: Estimate<Percent>;
}
/** A material's weight in the whole formula, on the composition's own scale. */
export type Weight = LineShare;

export interface CompositionRow {
	readonly key: string;
	readonly substance: Id<'substance'>;
	readonly nano: boolean;
	readonly use: Use;
	readonly roles: ReadonlySet<PartRole | 'ofWhich'>;
	readonly share: Estimate<Percent>;
	readonly contributions: readonly Contribution[];
}

/** One constituent of a weighed material; what bounds and order strength are computed from. */
export interface WeighedPart {
	readonly rowKey: string;
	readonly constituent: Id<'constituent'>;
	readonly substance: Id<'substance'>;
	readonly role: PartRole | 'ofWhich';
	readonly parent: Id<'constituent'> | null;
	readonly share: Estimate<PartShare>;
}
/** One material version has one composition in a formula, however many lines and bulks carry it: weights are added first. */
export interface WeighedMaterial {
	readonly material: Id<'material'>;
	readonly version: Id<'materialVersion'>;
	readonly typicalWeight: Weight;
	/** The weight at every corner of the range lines' box; without range lines one figure, the typical. */
	readonly corners: readonly Weight[];
	readonly parts: readonly WeighedPart[];
}

/**
 * Without bulks a share is in 10⁻¹⁶ % and a weight in 10⁻⁶ %. Each level of bulk in bulk multiplies by a further 10⁻⁸,
 * so that nothing is ever rounded: read every share with `shareDecimals` and every weight with `weightDecimals`.
 */
export interface Composition {
	readonly formula: Id<'formula'>;
	readonly levels: number;
	readonly shareDecimals: number;
	readonly weightDecimals: number;
	readonly rows: readonly CompositionRow[];
	readonly weighed: readonly WeighedMaterial[];
	/** Raised when the way of computing changes, so that stored readings can tell. */
	readonly engine: number;
}

export type CompositionFault =
	| { readonly kind: 'formulaMissing'; readonly formula: Id<'formula'> }
	| { readonly kind: 'materialMissing'; readonly material: Id<'material'> }
	| { readonly kind: 'noLines'; readonly formula: Id<'formula'> }
	| { readonly kind: 'cycle'; readonly path: readonly Id<'formula'>[] }
	| { readonly kind: 'severalQs'; readonly formula: Id<'formula'> }
	| { readonly kind: 'rangeWithoutQs'; readonly formula: Id<'formula'>; readonly line: Id<'line'> }
	| { readonly kind: 'tooManyRanges'; readonly formula: Id<'formula'>; readonly limit: number }
	| { readonly kind: 'rangeUpsideDown'; readonly formula: Id<'formula'>; readonly line: Id<'line'> }
	| { readonly kind: 'sumAbove100'; readonly formula: Id<'formula'>; readonly by: LineShare }
	| { readonly kind: 'sumBelow100'; readonly formula: Id<'formula'>; readonly by: LineShare }
	| {
			readonly kind: 'material';
			readonly material: Id<'material'>;
			readonly version: Id<'materialVersion'>;
			readonly fault: MaterialFault;
	  };
