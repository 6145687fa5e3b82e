import type { MarketRule } from './market';
import type { OrderedGroup } from './strength';
import type { Placed } from './list';
import type { Refusal, WeakPair } from './types';

/**
 * The usual order with the wish of an officer laid over it. A wish is a relative order of printed names: names that are gone
 * fall out of it, a new name enters before the first lighter one, and what only some shades hold stays behind everything.
 */
export function arranged(usual: readonly Placed[], wish: readonly string[]): readonly Placed[] {
	const byName = new Map(usual.map((placed) => [placed.candidate.name, placed]));
	const wanted = [...new Set(wish)].flatMap((name) => byName.get(name) ?? []);
	return usual
		.filter((placed) => !wanted.includes(placed))
		.reduce<readonly Placed[]>((sequence, placed) => {
			const at = sequence.findIndex((other) => usual.indexOf(other) > usual.indexOf(placed));
			return at < 0 ? [...sequence, placed] : [...sequence.slice(0, at), placed, ...sequence.slice(at)];
		}, wanted);
}

/**
 * What makes an order unlawful: a pair that some composition within the suppliers' ranges would print the other way round, a
 * colourant before what it must follow, a name of single shades before the end.
 */
export function judgeArrangement(
	placed: readonly Placed[],
	rule: MarketRule,
	group: OrderedGroup,
	weak: readonly WeakPair[]
): readonly Refusal[] {
	const byWeight = weak.map((pair): Refusal => ({ name: pair.before, before: pair.after, because: 'weight', pair }));
	const byKind = placed.flatMap((early, at) =>
		placed.slice(at + 1).flatMap((late): Refusal[] => {
			const because = wrongKind(early, late, rule, group);
			return because ? [{ name: early.candidate.name, before: late.candidate.name, because, pair: null }] : [];
		})
	);
	return [...byKind, ...byWeight];
}

function wrongKind(early: Placed, late: Placed, rule: MarketRule, group: OrderedGroup): Refusal['because'] | null {
	if (early.block === 'mayContain' && late.block !== 'mayContain') return 'mayContainLast';
	if (early.block !== 'colourant' || late.candidate.colourant || rule.colourants === 'anywhere') return null;
	// The perfume that stands last stands behind the colourants as well.
	if (rule.perfume === 'last' && late.candidate.perfume) return null;
	if (rule.colourants === 'afterOrdered' && late.candidate.share.high <= group.from) return null;
	return 'colourantLast';
}
