import { amountOf } from '../composition/amounts';
import type { Composition, CompositionRow, Contribution, WeighedPart } from '../composition/types';
import type { Estimate } from '../quantity/range';
import { compare, type Id, type Percent } from '../quantity/units';
import { isSource, readAllergens, type AllergenReading } from './allergens';
import { compareColourants, compareNames, euName } from './names';
import { weakPairs } from './strength';
import { widest } from './turning';
import type {
	Block,
	IngredientList,
	LeftOut,
	ListEntry,
	ListRequest,
	Reason,
	SubstanceIdentity,
	ThresholdQuestion
} from './types';

export const RULE = {
	order: 'eu-1223-2009/art-19-1-g',
	names: 'eu-1223-2009/art-33'
} as const;

/** An entry before it has its place: its name and the constituents that it stands for. */
interface Candidate {
	readonly name: string;
	readonly rows: readonly CompositionRow[];
	readonly select: (part: WeighedPart) => boolean;
	readonly colourant: boolean;
	readonly allergen: AllergenReading | null;
	readonly share: Estimate<Percent>;
}

const isListed = (part: { readonly role: string }) => part.role === 'ingredient' || part.role === 'carryOver';

/**
 * The ingredient list of one market with the reasons for every name. EU: descending weight when added; below 1 % in the same
 * order, which is lawful in any; colourants last by CI number; fragrance allergens above their threshold on the batch day under
 * their group names; "(nano)"; impurities and processing aids left out. Exactly 1.00 % is ordered (house reading of an open point).
 * Ties by printed name. Source: Regulation (EC) 1223/2009, Art. 19(1)(g), Art. 33, Annex III.
 */
export function ingredientList(composition: Composition, request: ListRequest): IngredientList {
	const allergens = readAllergens(composition, request);
	const named = allergens.filter((reading) => reading.inForce && reading.above);
	const candidates = candidatesOf(composition, request, named);
	const onePercent = 10n ** BigInt(composition.shareDecimals);
	const placed = candidates.map((candidate) => ({ candidate, block: blockOf(candidate, onePercent) })).sort(byPlace);
	const entries = placed.map(({ candidate, block }) => entryOf(candidate, block));
	const ordered = placed.filter(({ block }) => block !== 'colourant').map(({ candidate }) => candidate);
	return {
		market: request.market,
		shareDecimals: composition.shareDecimals,
		entries,
		text: entries.map((entry) => entry.name).join(', '),
		weak: weakPairs(composition, ordered, onePercent),
		leftOut: leftOutOf(composition, request, allergens, candidates),
		questions: questionsOf(composition, allergens)
	};
}

/** False while the order depends on a supplier's range. */
export const orderIsCertain = (list: IngredientList) => list.weak.length === 0;

const identityOf = (request: ListRequest, id: Id<'substance'>): SubstanceIdentity => {
	const identity = request.substances.get(id);
	if (!identity) throw new RangeError(`the request does not identify the substance ${id}`);
	return identity;
};

function candidatesOf(
	composition: Composition,
	request: ListRequest,
	named: readonly AllergenReading[]
): readonly Candidate[] {
	const groups = new Map<string, CompositionRow[]>();
	const nameOf = (row: CompositionRow) => {
		const reading = row.use === 'colourant' ? undefined : named.find(({ substances }) => substances.has(row.substance));
		return reading?.entry.labelName ?? euName(row, identityOf(request, row.substance));
	};
	for (const row of composition.rows) {
		if (![...row.roles].some((role) => isListed({ role }))) continue;
		const name = nameOf(row);
		groups.set(name, [...(groups.get(name) ?? []), row]);
	}
	const isSelected = (row: CompositionRow, select: Candidate['select']) =>
		row.contributions.some((contribution) => select(weighedAs(row, contribution)));
	const direct = [...groups].map(([name, rows]): Candidate => {
		const keys = new Set(rows.map((row) => row.key));
		const allergen = named.find(({ entry }) => entry.labelName === name) ?? null;
		const select = (part: WeighedPart) =>
			allergen
				? isSource(part) && (keys.has(part.rowKey) || allergen.substances.has(part.substance))
				: keys.has(part.rowKey) && isListed(part);
		return {
			name,
			rows: allergen ? composition.rows.filter((row) => isSelected(row, select)) : rows,
			select,
			colourant: rows.every((row) => row.use === 'colourant'),
			allergen,
			share: amountOf(composition.weighed, select)
		};
	});
	const inside = named
		.filter(({ entry }) => !groups.has(entry.labelName))
		.map((reading): Candidate => {
			const select = (part: WeighedPart) => isSource(part) && reading.substances.has(part.substance);
			const rows = composition.rows.filter((row) => isSelected(row, select));
			return { name: reading.entry.labelName, rows, select, colourant: false, allergen: reading, share: reading.share };
		});
	return [...direct, ...inside];
}

const weighedAs = (row: CompositionRow, { constituent, role, part }: Contribution): WeighedPart => ({
	rowKey: row.key,
	constituent,
	substance: row.substance,
	role,
	parent: null,
	share: part
});

const blockOf = (candidate: Candidate, onePercent: bigint): Block => {
	if (candidate.colourant) return 'colourant';
	return candidate.share.typical >= onePercent ? 'ordered' : 'free';
};

interface Placed {
	readonly candidate: Candidate;
	readonly block: Block;
}

function byPlace(a: Placed, b: Placed): number {
	const colourants = Number(a.block === 'colourant') - Number(b.block === 'colourant');
	if (colourants !== 0) return colourants;
	if (a.block === 'colourant') return compareColourants(a.candidate.name, b.candidate.name);
	return (
		compare(b.candidate.share.typical, a.candidate.share.typical) || compareNames(a.candidate.name, b.candidate.name)
	);
}

function entryOf(candidate: Candidate, block: Block): ListEntry {
	const { name, rows, share, allergen } = candidate;
	const listedDirectly = rows.some((row) => [...row.roles].some((role) => isListed({ role })));
	return {
		name,
		substances: [...new Set(rows.map((row) => row.substance))],
		rows,
		block,
		share,
		allergen: allergen !== null && !listedDirectly,
		why: [...contributionsOf(candidate), ...rulesOf(candidate, block)]
	};
}

const contributionsOf = ({ rows, select }: Candidate): Reason[] =>
	rows.flatMap((row) =>
		row.contributions
			.filter((contribution) => select(weighedAs(row, contribution)))
			.map((of) => ({ kind: 'contribution', of }) as const)
	);

function rulesOf(candidate: Candidate, block: Block): Reason[] {
	const order = {
		ordered: 'descending',
		free: 'belowOnePercent',
		colourant: 'colourantLast',
		mayContain: 'colourantLast'
	} as const;
	const rules: Reason[] = [
		{ kind: 'rule', ruleId: RULE.order, code: order[block] },
		{ kind: 'rule', ruleId: RULE.names, code: 'name' }
	];
	if (candidate.name === 'Parfum' || candidate.name === 'Aroma') {
		rules.push({ kind: 'rule', ruleId: RULE.order, code: 'perfume' });
	}
	if (candidate.rows.some((row) => row.nano)) rules.push({ kind: 'rule', ruleId: RULE.order, code: 'nano' });
	if (candidate.allergen) rules.push({ kind: 'rule', ruleId: candidate.allergen.entry.ruleId, code: 'allergen' });
	return rules;
}

function leftOutOf(
	composition: Composition,
	request: ListRequest,
	allergens: readonly AllergenReading[],
	candidates: readonly Candidate[]
): LeftOut[] {
	const printed = new Set(candidates.flatMap((candidate) => candidate.rows.map((row) => row.key)));
	return composition.rows
		.filter((row) => !printed.has(row.key))
		.map((row): LeftOut => {
			const name = euName(row, identityOf(request, row.substance));
			const common = { name, substances: [row.substance], share: row.share };
			if (row.roles.has('ofWhich')) {
				const reading = allergens.find(({ substances }) => substances.has(row.substance));
				if (!reading) return { ...common, reason: 'namedByPerfume', ruleId: RULE.order, limit: null };
				const reason = reading.inForce ? 'allergenAtOrBelow' : 'allergenNotYet';
				return { ...common, share: reading.share, reason, ruleId: reading.entry.ruleId, limit: reading.limit };
			}
			const reason = row.roles.has('impurity') ? 'impurity' : 'processingAid';
			return { ...common, reason, ruleId: RULE.order, limit: null };
		})
		.sort((a, b) => compareNames(a.name, b.name));
}

/** Thresholds that the ranges straddle: it cannot be told yet whether the name must be printed. */
const questionsOf = (composition: Composition, allergens: readonly AllergenReading[]): ThresholdQuestion[] =>
	allergens
		.filter(({ inForce, share, limit }) => inForce && share.low <= limit && share.high > limit)
		.map(({ entry, share, limit, above, substances }) => ({
			kind: 'allergen',
			name: entry.labelName,
			share,
			limit,
			ruleId: entry.ruleId,
			printed: above,
			ask: widest(composition, (part) => substances.has(part.substance))
		}));
