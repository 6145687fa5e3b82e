import { WHOLE_LINE, type Id, type LineShare } from '../quantity/units';
import type { CompositionFault, FormulaLine, FormulaVersionLines } from './types';

/** The share of every line of the tree, by line id. */
export type Shares = ReadonlyMap<Id<'line'>, LineShare>;
type Ends = ReadonlyMap<Id<'line'>, 'min' | 'max'>;

/** 2¹⁰ corners bound the work, over the formula and its bulks together; nobody adjusts eleven lines at once. */
const MOST_RANGE_LINES = 10;

const isRange = (line: FormulaLine) =>
	line.amount.kind === 'share' && (line.amount.min !== null || line.amount.max !== null);

function shareAt(line: FormulaLine, ends: Ends | null): bigint {
	if (line.amount.kind === 'qs') return 0n;
	const end = ends?.get(line.id);
	if (end === 'min') return line.amount.min ?? line.amount.share;
	if (end === 'max') return line.amount.max ?? line.amount.share;
	return line.amount.share;
}

/** What each line weighs when every range line stands at the given end (null: at its target); the q.s. line takes the rest. */
export function sharesOf(formulas: readonly FormulaVersionLines[], ends: Ends | null): Shares {
	const shares = new Map<Id<'line'>, LineShare>();
	for (const { lines } of formulas) {
		const stated = lines.reduce((total, line) => total + shareAt(line, ends), 0n);
		for (const line of lines) {
			const value = line.amount.kind === 'qs' ? WHOLE_LINE - stated : shareAt(line, ends);
			shares.set(line.id, value as LineShare);
		}
	}
	return shares;
}

/**
 * The shares at every corner of the box that the range lines span. A weighted sum is linear in each range line, so its lowest
 * and highest values stand at corners.
 */
export function corners(formulas: readonly FormulaVersionLines[]): readonly Shares[] {
	const ranged = formulas.flatMap(({ lines }) => lines.filter(isRange));
	if (ranged.length === 0) return [sharesOf(formulas, null)];
	return Array.from({ length: 2 ** ranged.length }, (_, corner) => {
		const ends = new Map(ranged.map((line, bit) => [line.id, (corner >> bit) & 1 ? 'max' : 'min'] as const));
		return sharesOf(formulas, ends);
	});
}

/** A formula sums to exactly 100 % after at most one q.s. line, also with every range line at its least and its most. */
export function judgeAmounts(formulas: readonly FormulaVersionLines[]): CompositionFault[] {
	const all = formulas.flatMap(({ lines }) => lines.filter(isRange)).length;
	const [outer] = formulas;
	if (outer && all > MOST_RANGE_LINES) {
		return [{ kind: 'tooManyRanges', formula: outer.formula, limit: MOST_RANGE_LINES }];
	}
	return formulas.flatMap(({ formula, lines }): CompositionFault[] => {
		if (lines.length === 0) return [{ kind: 'noLines', formula }];
		const qs = lines.filter((line) => line.amount.kind === 'qs');
		if (qs.length > 1) return [{ kind: 'severalQs', formula }];
		const ranged = lines.filter(isRange);
		const twisted = ranged.filter(isUpsideDown);
		if (twisted.length > 0) return twisted.map((line) => ({ kind: 'rangeUpsideDown', formula, line: line.id }));
		if (ranged.length > 0 && qs.length === 0) {
			return ranged.map((line) => ({ kind: 'rangeWithoutQs', formula, line: line.id }));
		}
		const atMost = new Map(ranged.map((line) => [line.id, 'max'] as const));
		const most = lines.reduce((total, line) => total + shareAt(line, atMost), 0n);
		if (most > WHOLE_LINE) return [{ kind: 'sumAbove100', formula, by: (most - WHOLE_LINE) as LineShare }];
		if (qs.length === 0 && most < WHOLE_LINE) {
			return [{ kind: 'sumBelow100', formula, by: (WHOLE_LINE - most) as LineShare }];
		}
		return [];
	});
}

function isUpsideDown({ amount }: FormulaLine): boolean {
	if (amount.kind === 'qs') return false;
	const min = amount.min ?? amount.share;
	const max = amount.max ?? amount.share;
	return min > amount.share || amount.share > max;
}
