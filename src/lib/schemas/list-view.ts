import type { LeftOutReason, Market } from '../domain/ingredients/types';

/** What the pages of a product show of its list: figures as exact decimals in %, reasons as addresses' parts. */
export interface WeighedView {
	readonly material: string;
	readonly materialId: string;
	readonly substanceId: string;
	readonly carryOver: boolean;
	readonly materialCode: string;
	readonly materialNumber: number;
	readonly formulaCode: string;
	readonly formulaNumber: number;
	readonly lineId: string;
	/** The line's share of the whole formula. */
	readonly weight: string;
	/** The constituent's share of the material: one figure, or its range. */
	readonly partLow: string;
	readonly partTypical: string;
	readonly partHigh: string;
	readonly basis: 'declared' | 'normalised' | 'derived';
	readonly amount: string;
	readonly document: {
		readonly id: string;
		readonly title: string;
		readonly page: number | null;
		readonly dated: string | null;
	} | null;
}
export interface RuleView {
	readonly id: string;
	readonly citation: string;
	readonly title: string;
	readonly text: string;
}
export type Place = 'certain' | 'restsOnTypical' | 'undecided' | 'free' | 'colourant';
export interface EntryView {
	readonly name: string;
	readonly materials: readonly string[];
	readonly low: string;
	readonly typical: string;
	readonly high: string;
	readonly basis: 'declared' | 'normalised' | 'derived';
	readonly block: 'ordered' | 'free' | 'colourant' | 'mayContain';
	readonly place: Place;
	readonly allergen: boolean;
	readonly weighed: readonly WeighedView[];
	readonly rules: readonly RuleView[];
}
export interface LeftOutView {
	readonly name: string;
	readonly reason: LeftOutReason;
	readonly typical: string;
	readonly limit: string | null;
}
/** What cannot be told yet of a list. */
export type QuestionView =
	| {
			readonly kind: 'threshold';
			readonly name: string;
			readonly low: string;
			readonly high: string;
			readonly limit: string;
	  }
	| { readonly kind: 'colourName'; readonly name: string; readonly candidates: readonly string[] };
export interface WeakView {
	readonly before: string;
	readonly after: string;
	readonly strength: 'restsOnTypical' | 'undecided';
	readonly turns: { readonly material: string; readonly inci: string; readonly percent: string } | null;
}
export interface DecisionView {
	readonly stream: string;
	readonly seq: string;
	readonly by: string;
	readonly at: string;
}
/** A place that an arrangement was not given, or has lost. */
export interface RefusalView {
	readonly name: string;
	readonly before: string;
	readonly because: 'weight' | 'colourantLast' | 'mayContainLast';
	readonly turns: WeakView['turns'];
}
export interface ListView {
	readonly market: Market;
	/** An officer's order is kept. */
	readonly arranged: boolean;
	readonly refused: readonly RefusalView[];
	readonly entries: readonly EntryView[];
	readonly text: string;
	readonly weak: readonly WeakView[];
	readonly leftOut: readonly LeftOutView[];
	readonly questions: readonly QuestionView[];
	readonly decision: DecisionView | null;
}
export interface BasisView {
	readonly formulaCode: string;
	readonly formulaNumber: number;
	readonly releasedOn: string;
	readonly batchDay: string;
	readonly ruleBook: string;
	readonly hash: string;
	readonly materials: readonly {
		readonly code: string;
		readonly name: string;
		readonly supplier: string;
		readonly number: number;
	}[];
}
