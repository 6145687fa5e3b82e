import type { CopyFault } from '$lib/domain/label/types';
import type { LabelWords } from '$lib/domain/label/words';

/** Sentences that a printed copy needs beside the phrases of its template. */
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** "1 Dec 2026" from an ISO date or instant. */
export function day(iso: string): string {
	const [year = '', month = '', date = ''] = iso.slice(0, 10).split('-');
	return `${Number(date)} ${MONTHS[Number(month) - 1]} ${year}`;
}

/** "1 Dec 2026, 14:02" in UTC. */
export const instant = (iso: string) => `${day(iso)}, ${iso.slice(11, 16)}`;

export const rulesWords = (ruleBook: string) => `Reg. (EC) 1223/2009, rule book ${ruleBook}`;

/** Without a kind the product is being checked again; without a name the cause is told by its kind alone. */
const CAUSE = {
	formula: 'a new version of the formula',
	material: 'new data of a raw material',
	product: 'a decision about the list'
} as const;

export function outOfDateWords(kind: 'formula' | 'material' | 'product' | null, name: string | null): string {
	if (kind === null) return 'What this copy rests on has changed and is being checked again.';
	const cause = name ?? CAUSE[kind];
	return `The ingredient list reads otherwise since ${cause}.`;
}

export function openWords(fault: CopyFault, words: LabelWords): string {
	switch (fault.kind) {
		case 'missing':
			return `${words.elements[fault.element]} is missing.`;
		case 'nothingReleased':
			return 'The formula has no released version, so there is no list.';
		case 'contradictory':
			return 'The formula or one of its materials contradicts itself, so there is no list.';
		case 'beingRechecked':
			return 'What the list rests on has changed and is being checked again.';
		case 'orderDependsOnRange':
			return `The order of ${fault.before} and ${fault.after} depends on a supplier’s range.`;
		case 'eMarkOutsideScope':
			return `The e-mark is for 5 g or ml up to 10 kg or l; this pack holds ${fault.size} ${fault.unit}.`;
	}
}
