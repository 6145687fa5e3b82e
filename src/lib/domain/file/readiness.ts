import type { IsoDate } from '../quantity/units';
import { NEEDS, SECTIONS, type Need, type Section } from './sections';

export type Readiness = 'notBegun' | 'incomplete' | 'ready' | 'outOfDate' | 'beingRechecked';
export type NeedState = 'present' | 'missing' | 'outOfDate' | 'notApplicable';

export interface FileDocument {
	readonly id: string;
	readonly kind: string;
	readonly title: string;
	readonly expires: IsoDate | null;
}
export interface FileFacts {
	readonly day: IsoDate;
	/** The released formula version that answers; null when none is released. */
	readonly formulaVersion: string | null;
	readonly beingRechecked: boolean;
	readonly materials: readonly {
		readonly code: string;
		readonly name: string;
		readonly documents: readonly FileDocument[];
	}[];
	/** Documents filed for a need, with the formula version that each was obtained on. */
	readonly filed: readonly {
		readonly need: string;
		readonly document: FileDocument;
		readonly formulaVersion: string | null;
	}[];
	readonly copy: 'none' | 'unapproved' | 'outOfDate' | 'approved';
	readonly claims: readonly { readonly wording: string; readonly state: 'supported' | 'notYet' | 'outOfDate' }[];
	/** The latest decision on each need that somebody decided. */
	readonly decisions: ReadonlyMap<string, { readonly applicable: boolean; readonly reason: string }>;
}

/** Why an item stands as it does: a code that the texts put into words, and what they name. */
export interface Why {
	readonly code:
		| 'released'
		| 'nothingReleased'
		| 'copyApproved'
		| 'copyMissing'
		| 'copyOutOfDate'
		| 'held'
		| 'notFiled'
		| 'expired'
		| 'otherFormula'
		| 'allMaterials'
		| 'materialsMissing'
		| 'materialsExpired'
		| 'claimsSupported'
		| 'noClaims'
		| 'claimsNotYet'
		| 'claimsOutOfDate'
		| 'notApplicable';
	readonly names: readonly string[];
}
export interface NeedReading {
	readonly need: Need;
	readonly state: NeedState;
	readonly why: Why;
	readonly documents: readonly string[];
}
export interface SectionReading {
	readonly section: Section;
	readonly readiness: Readiness;
	readonly needs: readonly NeedReading[];
}

/**
 * What every section holds and lacks, computed from the facts and never ticked. Where several states hold, being re-checked
 * comes before out of date, out of date before incomplete.
 */
export function readSections(facts: FileFacts): readonly SectionReading[] {
	return SECTIONS.map((section) => {
		const needs = NEEDS.filter((need) => need.section === section).map((need) => readNeed(need, facts));
		return { section, needs, readiness: readinessOf(needs, facts.beingRechecked) };
	});
}

/** How many sections are ready, of how many. */
export const countReady = (sections: readonly SectionReading[]) => ({
	ready: sections.filter(({ readiness }) => readiness === 'ready').length,
	all: sections.length
});

function readinessOf(needs: readonly NeedReading[], beingRechecked: boolean): Readiness {
	if (beingRechecked) return 'beingRechecked';
	const states = needs.map(({ state }) => state);
	if (states.includes('outOfDate')) return 'outOfDate';
	if (!states.includes('missing')) return 'ready';
	return states.every((state) => state === 'missing') ? 'notBegun' : 'incomplete';
}

function readNeed(need: Need, facts: FileFacts): NeedReading {
	const decision = facts.decisions.get(need.key);
	if (decision && !decision.applicable) {
		return { need, state: 'notApplicable', why: { code: 'notApplicable', names: [decision.reason] }, documents: [] };
	}
	switch (need.source.kind) {
		case 'releasedFormula':
			return facts.formulaVersion ? answer(need, 'present', 'released') : answer(need, 'missing', 'nothingReleased');
		case 'approvedCopy':
			return readCopy(need, facts.copy);
		case 'supportedClaims':
			return readClaims(need, facts);
		case 'everyMaterial':
			return readMaterials(need, need.source.document, facts);
		case 'productDocument':
			return readFiled(need, need.source.onFormula, facts);
	}
}

const answer = (
	need: Need,
	state: NeedState,
	code: Why['code'],
	names: readonly string[] = [],
	documents: readonly string[] = []
): NeedReading => ({ need, state, why: { code, names }, documents });

function readCopy(need: Need, copy: FileFacts['copy']): NeedReading {
	if (copy === 'approved') return answer(need, 'present', 'copyApproved');
	return copy === 'outOfDate' ? answer(need, 'outOfDate', 'copyOutOfDate') : answer(need, 'missing', 'copyMissing');
}

function readClaims(need: Need, { claims }: FileFacts): NeedReading {
	const namesOf = (state: string) => claims.filter((claim) => claim.state === state).map(({ wording }) => wording);
	if (claims.length === 0) return answer(need, 'missing', 'noClaims');
	if (namesOf('outOfDate').length > 0) return answer(need, 'outOfDate', 'claimsOutOfDate', namesOf('outOfDate'));
	if (namesOf('notYet').length > 0) return answer(need, 'missing', 'claimsNotYet', namesOf('notYet'));
	return answer(need, 'present', 'claimsSupported');
}

const counts = (document: FileDocument, day: IsoDate) => document.expires === null || document.expires >= day;

function readMaterials(need: Need, kind: string, { materials, day }: FileFacts): NeedReading {
	if (materials.length === 0) return answer(need, 'missing', 'nothingReleased');
	const ofKind = (material: FileFacts['materials'][number]) => material.documents.filter((each) => each.kind === kind);
	const without = materials.filter((material) => ofKind(material).length === 0);
	if (without.length > 0) {
		return answer(
			need,
			'missing',
			'materialsMissing',
			without.map(({ name }) => name)
		);
	}
	const expired = materials.filter((material) => !ofKind(material).some((document) => counts(document, day)));
	if (expired.length > 0)
		return answer(
			need,
			'outOfDate',
			'materialsExpired',
			expired.map(({ name }) => name)
		);
	const documents = materials.flatMap((material) => ofKind(material).map(({ id }) => id));
	return answer(need, 'present', 'allMaterials', [], documents);
}

/** The best of what is filed speaks: one that counts, else the reason why the newest no longer does. */
function readFiled(need: Need, onFormula: boolean, { filed, formulaVersion, day }: FileFacts): NeedReading {
	const own = filed.filter((each) => each.need === need.key);
	const fits = (each: (typeof own)[number]) => !onFormula || each.formulaVersion === formulaVersion;
	const counting = own.filter((each) => fits(each) && counts(each.document, day));
	if (counting.length > 0) {
		const titles = counting.map(({ document }) => document.title);
		return answer(
			need,
			'present',
			'held',
			titles,
			counting.map(({ document }) => document.id)
		);
	}
	const newest = own.at(-1);
	if (!newest) return answer(need, 'missing', 'notFiled');
	return answer(need, 'outOfDate', fits(newest) ? 'expired' : 'otherFormula', [newest.document.title]);
}
