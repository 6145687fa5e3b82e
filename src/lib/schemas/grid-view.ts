/** What the formula grid knows of a material or bulk: enough to compute composition and list in the browser. */
export interface ConstituentView {
	readonly id: string;
	readonly substance: string;
	readonly inci: string;
	readonly key: string;
	readonly cas: readonly string[];
	readonly colourIndex: string | null;
	readonly place: 'inSum' | 'ofWhich';
	readonly role: 'ingredient' | 'carryOver' | 'impurity' | 'processingAid' | null;
	readonly parent: string | null;
	readonly use: 'colourant' | 'uvFilter' | 'hairDye' | 'preservative' | 'other';
	readonly nano: boolean;
	readonly low: string | null;
	readonly typical: string | null;
	readonly high: string | null;
	readonly highOpen: boolean;
}
export interface MaterialView {
	readonly id: string;
	readonly versionId: string;
	readonly code: string;
	readonly name: string;
	readonly supplier: string;
	readonly number: number;
	readonly constituents: readonly ConstituentView[];
	readonly documented: number;
}
export interface LineView {
	readonly id: string;
	readonly phase: string;
	readonly kind: 'material' | 'formula';
	readonly code: string;
	readonly name: string;
	readonly percent: string;
	/** Of an adjuster; empty where the amount is one figure. */
	readonly min: string;
	readonly max: string;
	readonly qs: boolean;
	/** The bulk's version that answers whatever is released later; null follows the newest. */
	readonly pinned: number | null;
	readonly pinReason: string;
}
/** A bulk in the tree of a formula, with the lines of the version that answers for it. */
export interface BulkView {
	readonly id: string;
	readonly code: string;
	readonly name: string;
	readonly number: number;
	/** As the lines name it: the version that they pin, or null for the newest. */
	readonly pinned: number | null;
	/** Every released version, newest first. */
	readonly released: readonly number[];
	readonly lines: readonly LineView[];
}
/** A bulk with everything below it. */
export interface BulkTree {
	readonly bulks: readonly BulkView[];
	readonly materials: readonly MaterialView[];
}
/** What can become a line. */
export type Suggestion =
	| { readonly kind: 'material'; readonly material: MaterialView }
	| { readonly kind: 'formula'; readonly code: string; readonly name: string; readonly number: number };
/** A line in the hands of the person who edits it. */
export type EditedLine = { -readonly [Key in keyof LineView]: LineView[Key] };
