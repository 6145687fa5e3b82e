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
	readonly qs: boolean;
}
/** A line in the hands of the person who edits it. */
export type EditedLine = { -readonly [Key in keyof LineView]: LineView[Key] };
