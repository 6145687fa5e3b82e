import type { CopyJudgement, ElementRow, LabelContent } from '../domain/label/types';
import type { ElementChange } from '../domain/label/forms';
import type { DecisionView, RuleView } from './list-view';

export type CopyStateName =
	'draft' | 'inReview' | 'sentBack' | 'approvedByLaboratory' | 'approvedByClient' | 'inUse' | 'superseded';

/** Where the words of an element come from; everything but `copy` is somebody else's to change. */
export type ElementSource = 'product' | 'pack' | 'market' | 'list' | 'copy';
export interface ElementView extends ElementRow {
	readonly source: ElementSource;
	readonly rule: RuleView | null;
}
export interface ApprovalView {
	readonly role: 'officer' | 'client';
	readonly decision: 'approved' | 'sentBack';
	readonly name: string;
	readonly at: string;
	readonly comment: string | null;
}
/** What a release did to a copy. `cause` names a version for the laboratory and only its kind for a client. */
export interface EffectView {
	readonly id: string;
	readonly effect: 'saysSomethingElse' | 'untouched';
	readonly causeKind: 'formula' | 'material' | 'product';
	readonly cause: string | null;
	readonly oldText: string;
	readonly newText: string;
	readonly at: string;
}
export interface CopyHead {
	readonly id: string;
	readonly packId: string;
	readonly packName: string;
	readonly market: string;
	readonly number: number | null;
	readonly state: CopyStateName;
	readonly outOfDate: boolean;
	readonly beingRechecked: boolean;
	/** A later copy of the same pack and market is approved, so that this one is not printed from any more. */
	readonly overtaken: boolean;
	readonly firstBatch: string | null;
	readonly lastBatch: string | null;
	readonly contentHash: string | null;
	readonly createdAt: string;
	readonly createdBy: string;
}
export interface BasisLine {
	readonly formulaCode: string;
	readonly formulaNumber: number;
	readonly releasedOn: string;
	readonly ruleBook: string;
}
export interface CopyView extends CopyHead {
	readonly rev: number;
	readonly content: LabelContent;
	readonly elements: readonly ElementView[];
	readonly judgement: CopyJudgement;
	/** The list that the composition gives today; null when it gives none. */
	readonly listNow: string | null;
	readonly basis: BasisLine | null;
	/** Recorded with the list where the ranges left something open. */
	readonly why: string | null;
	readonly approvals: readonly ApprovalView[];
	readonly effects: readonly EffectView[];
	readonly decision: DecisionView | null;
	/** The copy in use that this one would supersede. */
	readonly replacesInUse: { readonly number: number | null; readonly firstBatch: string | null } | null;
}

export interface CounterCopy extends CopyHead {
	readonly content: LabelContent;
	readonly elements: readonly ElementRow[];
	readonly approvals: readonly ApprovalView[];
	readonly effects: readonly EffectView[];
	/** Against the copy that was approved before; null when there was none. */
	readonly changes: readonly ElementChange[] | null;
	readonly changedFrom: number | null;
}
export interface CounterIssue {
	readonly number: number;
	readonly date: string;
	readonly sha256: string;
	readonly pages: number;
	readonly shared: boolean;
}
export interface CounterProductView {
	readonly slug: string;
	readonly name: string;
	readonly functionText: string;
	readonly packs: readonly {
		readonly id: string;
		readonly name: string;
		readonly size: string;
		readonly unit: string;
	}[];
	/** Waits for this client's approval and still stands. */
	readonly needs: readonly CounterCopy[];
	/** Was waiting for approval when its reasons moved: the laboratory acts next. */
	readonly corrected: readonly CounterCopy[];
	/** The newest approved copy of each pack and market, and the one in use beside it. */
	readonly approved: readonly CounterCopy[];
	readonly sentBack: readonly CounterCopy[];
	readonly issues: readonly CounterIssue[];
}
