/**
 * What the printed documents are made of. Everything arrives ready to print: percentages, dates and durations are
 * already formatted in the document's language, so that a template computes nothing and the same data always gives the
 * same page. Only strings, numbers, booleans and null, so that a request survives JSON on its way to the child process.
 */

/** English only so far; the phrases of a second language must satisfy the same shape. */
export type PrintLanguage = 'en';

export type PrintedCopyState =
	'draft' | 'inReview' | 'sentBack' | 'approvedByLaboratory' | 'approvedByClient' | 'inUse' | 'superseded';

export type PrintedElement =
	| 'brand'
	| 'name'
	| 'function'
	| 'nominalContent'
	| 'directions'
	| 'precautions'
	| 'durability'
	| 'periodAfterOpening'
	| 'storage'
	| 'responsiblePerson'
	| 'origin'
	| 'batch';

export interface ElementPrint {
	readonly element: PrintedElement;
	/** The words of the label in the document's language. Line breaks are kept. Null when the element is missing. */
	readonly text: string | null;
	/** The article that asks for it, for example `Art. 19(1)(f)`; empty where nothing asks. */
	readonly requiredBy: string;
	/** True where the law fixes the wording (set in semibold). */
	readonly prescribed: boolean;
}

export interface IngredientPrint {
	readonly name: string;
	/** True while its place in the order is not settled: underlined, and the copy cannot be approved. */
	readonly undecided: boolean;
}

export interface IngredientListPrint {
	/** The word in front of the list on the pack, for example `Ingredients`. */
	readonly heading: string;
	readonly names: readonly IngredientPrint[];
	/** Colourants that may be present, printed as one bracketed group after the list; empty when there are none. */
	readonly mayContain: readonly string[];
	readonly requiredBy: string;
}

export interface FormulaPrint {
	readonly code: string;
	readonly version: number;
	/** Which released versions of its materials answered; every print names it beside the version. */
	readonly basis: number;
	/** Printed date of release; null while the version is a draft. */
	readonly released: string | null;
}

export interface ApprovalPrint {
	readonly role: 'laboratory' | 'client';
	readonly decision: 'approved' | 'sentBack';
	readonly name: string;
	readonly date: string;
	readonly comment: string | null;
}

/** A label copy: one pack, one market. `mark-of.ts` says from state and age whether it carries a mark. */
export interface LabelCopyData {
	readonly language: PrintLanguage;
	readonly productName: string;
	readonly brandName: string;
	readonly clientName: string;
	/** For example `Carton, 50 ml`. */
	readonly packName: string;
	/** For example `European Union`. */
	readonly marketName: string;
	readonly state: PrintedCopyState;
	/** The cause in words when what the copy rests on has moved since; null when it still stands. */
	readonly outOfDate: string | null;
	/** Gapless, taken at the laboratory's approval; null before. */
	readonly number: number | null;
	/** SHA-256 of the frozen text, 64 hexadecimal digits; null while the text is not frozen. */
	readonly contentHash: string | null;
	readonly formula: FormulaPrint;
	/** For example `Reg. (EC) 1223/2009, rule book EU 2026.11`. */
	readonly rules: string;
	/** For example `1 Dec 2026, 14:20`. */
	readonly madeOn: string;
	readonly compiledBy: string;
	/** First batch, once in use. */
	readonly inUseFrom: string | null;
	readonly elements: readonly ElementPrint[];
	readonly list: IngredientListPrint;
	/** What keeps it a draft, one sentence each. */
	readonly open: readonly string[];
	readonly approvals: readonly ApprovalPrint[];
}

/** The sections of the file in printed order: a1 to a10 are the headings of Part A, b1 to b4 those of Part B. */
export const PRINTED_SECTIONS = [
	'description',
	'a1',
	'a2',
	'a3',
	'a4',
	'a5',
	'a6',
	'a7',
	'a8',
	'a9',
	'a10',
	'b1',
	'b2',
	'b3',
	'b4',
	'method',
	'practice',
	'effect',
	'animalTesting'
] as const;
export type PrintedSection = (typeof PRINTED_SECTIONS)[number];

export type PrintedReadiness = 'notBegun' | 'incomplete' | 'ready' | 'outOfDate' | 'beingRechecked';

/** One thing that a section needs, and what answers it. */
export interface NeedPrint {
	readonly item: string;
	/** The article, or `house rule`. */
	readonly law: string;
	readonly answer: 'held' | 'missing' | 'outOfDate' | 'notApplicable';
	/** Held: which document. Out of date or not applicable: the reason, with who and when. Missing: what would settle it. */
	readonly words: string;
}

export interface FactPrint {
	readonly label: string;
	readonly value: string;
}

export interface TableColumnPrint {
	readonly head: string;
	/** `number` is set to the right; `code` (CAS, batch, hash) in the fixed-width face. */
	readonly kind: 'text' | 'number' | 'code';
	/** Share of the width in relation to the other columns of the table. */
	readonly weight: number;
}

/** A heading of a section is filled with blocks in order. */
export type BlockPrint =
	| { readonly kind: 'text'; readonly text: string }
	| { readonly kind: 'note'; readonly text: string }
	| { readonly kind: 'subheading'; readonly text: string }
	| { readonly kind: 'steps'; readonly steps: readonly string[] }
	| { readonly kind: 'facts'; readonly rows: readonly FactPrint[] }
	| {
			readonly kind: 'table';
			readonly title: string | null;
			readonly columns: readonly TableColumnPrint[];
			readonly rows: readonly (readonly string[])[];
	  };

export interface SectionPrint {
	readonly section: PrintedSection;
	readonly readiness: PrintedReadiness;
	/** What is open, in a few words for the contents, for example `not signed`; empty when nothing is. */
	readonly openWords: string;
	readonly needs: readonly NeedPrint[];
	readonly blocks: readonly BlockPrint[];
}

export interface CompositionRowPrint {
	/** Place in the table; null for a constituent that stands inside the row above (`of which`). */
	readonly number: number | null;
	readonly name: string;
	/** Empty where there is none; several are separated by a comma. */
	readonly cas: string;
	readonly function: string;
	/** % w/w, every row with the same number of decimals. */
	readonly share: string;
	/** `65.789–66.289`; empty when the share is exact. */
	readonly range: string;
	/** Places in `sources`, counted from 0; they print as letters. */
	readonly sources: readonly number[];
}

export interface SourcePrint {
	readonly name: string;
	/** Kind, supplier and date of the document; `no document` when there is none. */
	readonly detail: string;
}

/** The table of Part A heading 1. */
export interface CompositionPrint {
	readonly lead: string;
	readonly rows: readonly CompositionRowPrint[];
	readonly sum: string;
	readonly sources: readonly SourcePrint[];
	/** Sentences under the table, for example where a typical share is derived. */
	readonly notes: readonly string[];
}

/** The six criteria of Regulation (EU) 655/2013 in the order of its annex. */
export const PRINTED_CRITERIA = [
	'legalCompliance',
	'truthfulness',
	'evidentialSupport',
	'honesty',
	'fairness',
	'informedDecision'
] as const;
export type PrintedCriterion = (typeof PRINTED_CRITERIA)[number];

export interface ClaimPrint {
	readonly wording: string;
	/** Where it is used: pack, web, retailer. */
	readonly usedOn: string;
	/** Null where nobody has answered yet. */
	readonly answers: Readonly<Record<PrintedCriterion, string | null>>;
	/** Titles of the linked documents. */
	readonly evidence: readonly string[];
}

export interface EvidencePrint {
	readonly title: string;
	readonly kind: string;
	/** Full SHA-256, 64 hexadecimal digits. */
	readonly sha256: string;
	/** Null where the document cannot be read (encrypted) or has no pages. */
	readonly pages: number | null;
	/** Date of the document; `undated` is the caller's word for none. */
	readonly dated: string;
	/** For example `kept, cannot be bound`; empty when nothing needs saying. */
	readonly note: string;
}

export type IssuePrint =
	| { readonly kind: 'trial'; readonly number: number; readonly date: string }
	| {
			readonly kind: 'sealed';
			readonly number: number;
			readonly date: string;
			readonly sealedBy: string;
			/** Hash of the manifest; the file cannot hold its own. */
			readonly manifestHash: string;
	  };

export interface ProductFileData {
	readonly language: PrintLanguage;
	readonly productName: string;
	/** For example `Night face cream, leave-on, 50 ml glass jar`. */
	readonly subtitle: string;
	readonly responsiblePerson: { readonly name: string; readonly address: string };
	readonly compiledBy: { readonly organisation: string; readonly person: string };
	readonly formula: FormulaPrint;
	readonly rules: string;
	/** `from batch 26-131`; null when no batch is placed yet. */
	readonly inUse: string | null;
	/** For example `ten years after the last batch is placed, at the address above`. */
	readonly kept: string;
	readonly issue: IssuePrint;
	/** Any order; they print in the order of PRINTED_SECTIONS. A section that is left out prints as not begun. */
	readonly sections: readonly SectionPrint[];
	readonly composition: CompositionPrint | null;
	readonly claims: readonly ClaimPrint[];
	/** The copies whose text is bound, usually one per pack and market. */
	readonly copies: readonly LabelCopyData[];
	readonly evidence: readonly EvidencePrint[];
}

/** The weighings of one batch; every amount is in g and ready to print. */
export interface BatchSheetData {
	readonly language: PrintLanguage;
	readonly laboratory: string;
	readonly formulaName: string;
	readonly formulaCode: string;
	readonly version: number;
	readonly released: boolean;
	readonly size: string;
	readonly step: string;
	readonly total: string;
	readonly lines: readonly {
		readonly code: string;
		readonly name: string;
		readonly phase: string;
		/** Names of the bulks above it; empty for a line of the formula itself. */
		readonly within: string;
		readonly amount: string;
		/** Content of the lot in % of the nominal one; empty where it is not corrected. */
		readonly lot: string;
	}[];
}
