import type { Phrases } from '../phrases/index';
import type { FormulaPrint, LabelCopyData } from './types';

export function formulaWords(formula: FormulaPrint, t: Phrases): string {
	const words = t.shared.formula(formula.code, formula.version, formula.basis);
	return formula.released === null ? t.shared.formulaDraft(words) : t.shared.formulaReleased(words, formula.released);
}

/** a to z, then aa, ab, …: letters beside the figures that say where each comes from. */
export function letterOf(index: number): string {
	const last = String.fromCharCode(97 + (index % 26));
	return index < 26 ? last : letterOf(Math.floor(index / 26) - 1) + last;
}

export function stateWords(copy: Pick<LabelCopyData, 'state' | 'outOfDate'>, t: Phrases): string {
	const state = t.copy.states[copy.state];
	return copy.outOfDate === null ? state : t.copy.stateOutOfDate(state);
}
