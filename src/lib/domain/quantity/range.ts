/** `highOpen`: the supplier wrote "< 1 %"; it decides "below" against "at most". */
export interface Range<Q extends bigint> {
	readonly low: Q;
	readonly high: Q;
	readonly highOpen: boolean;
}
/** How far a typical value can be trusted; the weakest of its contributions when summed. */
export type TypicalBasis = 'declared' | 'normalised' | 'derived';
export interface Estimate<Q extends bigint> extends Range<Q> {
	readonly typical: Q;
	readonly basis: TypicalBasis;
}

const ORDER: readonly TypicalBasis[] = ['declared', 'normalised', 'derived'];
export const weakest = (bases: readonly TypicalBasis[]): TypicalBasis =>
	ORDER[Math.max(0, ...bases.map((basis) => ORDER.indexOf(basis)))] ?? 'declared';
