import type { Composition } from '../composition/types';
import { judgeArrangement, arranged } from './arrangement';
import { identityOf, listedUnder, readCandidates, weighedAs, type Candidate, type Reading } from './candidates';
import { compareByIndex } from './colour-names';
import { MARKET_RULES, type MarketRule } from './market';
import { compareNames, declaredName } from './names';
import { weakPairs, type OrderedGroup } from './strength';
import { widest } from './turning';
import type { AllergenReading } from './allergens';
import type {
	Block,
	IngredientList,
	LeftOut,
	ListEntry,
	ListQuestion,
	ListRequest,
	Reason,
	Refusal,
	WeakPair
} from './types';

/** A candidate with the part of the list in which it stands. */
export interface Placed {
	readonly candidate: Candidate;
	readonly block: Block;
}

/**
 * The ingredient list of one market with the reasons for every name: descending weight, below (or not above) 1 % in the same
 * order, which is lawful in any; colourants behind by colour index; fragrance allergens above their threshold on the batch day
 * under their group names; impurities, technical aids and justified carry-over left out. Ties by printed name. What the markets
 * differ in stands in market.ts, with its sources.
 */
export const ingredientList = (composition: Composition, request: ListRequest): IngredientList =>
	shadedList([composition], request);

/**
 * One list for all shades: lawful in each of them. Colourants that only some shades hold stand behind the market's mark for
 * shades. @throws RangeError without a composition, or for compositions of different scales.
 */
export function shadedList(compositions: readonly Composition[], request: ListRequest): IngredientList {
	const [first] = compositions;
	if (!first || compositions.some(({ shareDecimals }) => shareDecimals !== first.shareDecimals))
		throw new RangeError('the shades of a list stand on one scale');
	const rule = MARKET_RULES[request.market];
	const group: OrderedGroup = {
		from: 10n ** BigInt(first.shareDecimals),
		strict: rule.ordered === 'aboveOnePercent'
	};
	const reading = readCandidates(compositions, request, rule);
	const usual = reading.candidates
		.map((candidate) => ({ candidate, block: blockOf(candidate, group) }))
		.sort((a, b) => byPlace(a, b, rule));
	const pairsOf = (placed: readonly Placed[]) => allWeakPairs(compositions, placed, group, rule);
	const { placed, refused } = placedAs(usual, request, rule, group, pairsOf);
	return {
		market: request.market,
		shareDecimals: first.shareDecimals,
		entries: placed.map((each) => entryOf(each, rule)),
		text: textOf(placed, rule),
		weak: pairsOf(placed),
		leftOut: leftOutOf(compositions, request, rule, reading),
		questions: questionsOf(compositions, reading),
		refused
	};
}

/** False while the order depends on a supplier's range. */
export const orderIsCertain = (list: IngredientList) => list.weak.length === 0;

function placedAs(
	usual: readonly Placed[],
	{ arrangement, arrangementIs }: ListRequest,
	rule: MarketRule,
	group: OrderedGroup,
	pairsOf: (placed: readonly Placed[]) => readonly WeakPair[]
) {
	if (!arrangement) return { placed: usual, refused: [] };
	const judge = (placed: readonly Placed[]) => judgeArrangement(placed, rule, group, pairsOf(placed));
	if (arrangementIs === 'kept') return keptPart(usual, arrangement, judge);
	const wanted = arranged(usual, arrangement);
	const refused = judge(wanted);
	return { placed: refused.length === 0 ? wanted : usual, refused };
}

/** Drops from the wish what has become unlawful, until the rest holds. */
function keptPart(
	usual: readonly Placed[],
	arrangement: readonly string[],
	judge: (placed: readonly Placed[]) => readonly Refusal[]
) {
	const pairOf = ({ name, before }: Refusal) => `${name}|${before}`;
	const inAnyCase = new Set(judge(usual).map(pairOf));
	const dropped: Refusal[] = [];
	let wish = arrangement;
	for (;;) {
		const placed = arranged(usual, wish);
		const wrong = judge(placed).filter((refusal) => !inAnyCase.has(pairOf(refusal)));
		if (wrong.length === 0) return { placed, refused: dropped };
		dropped.push(...wrong);
		const names = new Set(wrong.map(({ name }) => name));
		const left = wish.filter((name) => !names.has(name));
		if (left.length === wish.length) return { placed: usual, refused: dropped };
		wish = left;
	}
}

function blockOf({ colourant, inEvery, share }: Candidate, { from, strict }: OrderedGroup): Block {
	if (colourant) return inEvery ? 'colourant' : 'mayContain';
	return share.typical > from || (!strict && share.typical === from) ? 'ordered' : 'free';
}

/** 0 by weight, 1 colourants, 2 the perfume where it stands last, 3 what only some shades hold. */
function partOf({ candidate, block }: Placed, rule: MarketRule): number {
	if (block === 'mayContain') return 3;
	if (block === 'colourant') return 1;
	return candidate.perfume && rule.perfume === 'last' ? 2 : 0;
}

function byPlace(a: Placed, b: Placed, rule: MarketRule): number {
	const parts = partOf(a, rule) - partOf(b, rule);
	if (parts !== 0) return parts;
	if (a.candidate.colourant) return compareByIndex(a.candidate, b.candidate);
	const [x, y] = [a.candidate.share.typical, b.candidate.share.typical];
	if (x !== y) return x < y ? 1 : -1;
	return compareNames(a.candidate.name, b.candidate.name);
}

function textOf(placed: readonly Placed[], { shades }: MarketRule): string {
	const names = (some: readonly Placed[]) => some.map(({ candidate }) => candidate.name).join(', ');
	const certain = placed.filter(({ block }) => block !== 'mayContain');
	const perhaps = placed.filter(({ block }) => block === 'mayContain');
	return names(certain) + (perhaps.length > 0 ? shades.opens + names(perhaps) + shades.closes : '');
}

/** A perfume behind all names that are no colourant has its place by another rule than weight, where the market has that rule. */
function ruledByWeight(placed: readonly Placed[], rule: MarketRule): readonly Placed[] {
	const plain = placed.filter(({ candidate }) => !candidate.colourant);
	if (rule.perfume !== 'last') return plain;
	return plain.filter(
		({ candidate }, at) => !candidate.perfume || plain.slice(at).some((later) => !later.candidate.perfume)
	);
}

function allWeakPairs(
	compositions: readonly Composition[],
	placed: readonly Placed[],
	group: OrderedGroup,
	rule: MarketRule
): readonly WeakPair[] {
	const names = ruledByWeight(placed, rule).map(({ candidate }) => candidate);
	const [only, ...more] = compositions;
	if (only && more.length === 0) return weakPairs(only, names, group);
	const found = new Map<string, WeakPair>();
	for (const composition of compositions)
		for (const pair of weakPairs(composition, names, group)) {
			const key = `${pair.before}|${pair.after}`;
			if (found.get(key)?.strength !== 'undecided') found.set(key, pair);
		}
	return [...found.values()];
}

function entryOf({ candidate, block }: Placed, rule: MarketRule): ListEntry {
	const { name, rows, share, allergen } = candidate;
	const listedDirectly = rows.some(({ roles }) => roles.has('ingredient') || roles.has('carryOver'));
	return {
		name,
		substances: [...new Set(rows.map((row) => row.substance))],
		rows,
		block,
		share,
		allergen: allergen !== null && !listedDirectly,
		why: [...contributionsOf(candidate), ...rulesOf(candidate, block, rule)]
	};
}

const contributionsOf = ({ rows, select }: Candidate): Reason[] =>
	rows.flatMap((row) =>
		row.contributions
			.filter((contribution) => select(weighedAs(row, contribution)))
			.map((of) => ({ kind: 'contribution', of }) as const)
	);

const ORDER_CODE = {
	ordered: 'descending',
	free: 'belowOnePercent',
	colourant: 'colourantLast',
	mayContain: 'mayContain'
} as const satisfies Record<Block, string>;

function rulesOf(candidate: Candidate, block: Block, { orderRule, nameRule, nano }: MarketRule): Reason[] {
	const rules: Reason[] = [
		{ kind: 'rule', ruleId: orderRule, code: ORDER_CODE[block] },
		{ kind: 'rule', ruleId: nameRule, code: 'name' }
	];
	if (candidate.perfume) rules.push({ kind: 'rule', ruleId: orderRule, code: 'perfume' });
	if (nano && candidate.rows.some((row) => row.nano)) rules.push({ kind: 'rule', ruleId: orderRule, code: 'nano' });
	if (candidate.allergen) rules.push({ kind: 'rule', ruleId: candidate.allergen.entry.ruleId, code: 'allergen' });
	return rules;
}

function leftOutOf(
	compositions: readonly Composition[],
	request: ListRequest,
	rule: MarketRule,
	{ candidates, allergens }: Reading
): LeftOut[] {
	const isListed = listedUnder(compositions, request);
	const printed = new Set(candidates.flatMap((candidate) => candidate.rows.map((row) => row.key)));
	const left = new Map<string, LeftOut>();
	for (const row of compositions.flatMap(({ rows }) => rows)) {
		if (printed.has(row.key) || left.has(row.key) || row.contributions.some(isListed)) continue;
		const { name } = declaredName(rule, row, identityOf(request, row.substance), request.names);
		const common = { name, substances: [row.substance], share: row.share, ruleId: rule.orderRule, limit: null };
		left.set(row.key, { ...common, ...reasonOf(row, allergens) });
	}
	return [...left.values()].sort((a, b) => compareNames(a.name, b.name));
}

function reasonOf(
	row: Candidate['rows'][number],
	allergens: readonly AllergenReading[]
): Pick<LeftOut, 'reason'> & Partial<LeftOut> {
	if (row.roles.has('carryOver')) return { reason: 'carryOver' };
	if (!row.roles.has('ofWhich')) return { reason: row.roles.has('impurity') ? 'impurity' : 'processingAid' };
	const reading = allergens.find(({ substances }) => substances.has(row.substance));
	if (!reading) return { reason: 'namedByPerfume' };
	const reason = reading.inForce ? 'allergenAtOrBelow' : 'allergenNotYet';
	return { share: reading.share, reason, ruleId: reading.entry.ruleId, limit: reading.limit };
}

/** What it cannot be told yet: thresholds that the ranges straddle, and colours whose listed name depends on their salt. */
function questionsOf(compositions: readonly Composition[], { candidates, allergens }: Reading): ListQuestion[] {
	const ask = (select: Candidate['select']) =>
		compositions.map((composition) => widest(composition, select)).find((material) => material !== null) ?? null;
	const open = allergens.filter(({ inForce, share, limit }) => inForce && share.low <= limit && share.high > limit);
	const thresholds = [...new Map(open.map((reading) => [reading.entry.labelName, reading])).values()].map(
		({ entry, share, limit, above, substances }) =>
			({
				kind: 'allergen',
				name: entry.labelName,
				share,
				limit,
				ruleId: entry.ruleId,
				printed: above,
				ask: ask((part) => substances.has(part.substance))
			}) as const
	);
	const names = candidates.flatMap(({ name, doubt, rows }) =>
		doubt ? [{ kind: 'colourName', name, doubt, ask: rows[0]?.contributions[0]?.material ?? null } as const] : []
	);
	return [...thresholds, ...names];
}
