import { amountOf } from '../composition/amounts';
import { touching } from '../composition/touching';
import type { Composition, CompositionRow, Contribution, WeighedMaterial, WeighedPart } from '../composition/types';
import { weakest, type Estimate } from '../quantity/range';
import { compare, type Id, type Percent } from '../quantity/units';
import { isSource, readAllergens, type AllergenReading } from './allergens';
import type { MarketRule } from './market';
import { declaredName, perfumeWord } from './names';
import { carryOverKey, type ListRequest, type NameDoubt, type SubstanceIdentity } from './types';

/** An entry before it has its place: its name and the constituents that it stands for. */
export interface Candidate {
	readonly name: string;
	readonly doubt: NameDoubt | null;
	/** Of the composition that holds most of it. */
	readonly rows: readonly CompositionRow[];
	readonly select: (part: WeighedPart) => boolean;
	readonly colourant: boolean;
	readonly index: string | null;
	readonly perfume: boolean;
	readonly allergen: AllergenReading | null;
	/** Lowest and highest over all shades, typical of the shade that holds most. */
	readonly share: Estimate<Percent>;
	/** The materials that hold any of it, by composition. */
	readonly within: ReadonlyMap<Composition, readonly WeighedMaterial[]>;
	/** Every shade holds some. */
	readonly inEvery: boolean;
}

/** What is read before names are placed: the candidates, and every allergen entry that found something. */
export interface Reading {
	readonly candidates: readonly Candidate[];
	readonly allergens: readonly AllergenReading[];
}

export const identityOf = (request: ListRequest, id: Id<'substance'>): SubstanceIdentity => {
	const identity = request.substances.get(id);
	if (!identity) throw new RangeError(`the request does not identify the substance ${id}`);
	return identity;
};

/** Names and amounts over all shades of a product; one composition where it has none. */
export function readCandidates(compositions: readonly Composition[], request: ListRequest, rule: MarketRule): Reading {
	const allergens = compositions.flatMap((composition) => readAllergens(composition, request));
	const named = new Map(
		allergens.filter(({ inForce, above }) => inForce && above).map((reading) => [reading.entry.labelName, reading])
	);
	const isListed = listedUnder(compositions, request);
	const groups = groupByName(compositions, request, rule, named, isListed);
	const direct = [...groups.values()].map((group) => directCandidate(compositions, group, named, isListed));
	const inside = [...named.values()]
		.filter(({ entry }) => !groups.has(entry.labelName))
		.map((reading) => insideCandidate(compositions, reading));
	return { candidates: [...direct, ...inside], allergens };
}

type IsListed = (part: Pick<WeighedPart, 'role' | 'constituent'>) => boolean;

/** Ingredients and carry-over are listed, but for carry-over that a recorded justification leaves out. */
export function listedUnder(compositions: readonly Composition[], request: ListRequest): IsListed {
	const leftOut = new Set(
		compositions.flatMap(({ rows }) =>
			rows.flatMap(({ substance, contributions }) =>
				contributions
					.filter(({ role, material }) => role === 'carryOver' && justified(request, substance, material))
					.map(({ constituent }) => constituent)
			)
		)
	);
	return ({ role, constituent }) => (role === 'ingredient' || role === 'carryOver') && !leftOut.has(constituent);
}

const justified = (request: ListRequest, substance: Id<'substance'>, material: Id<'material'>) =>
	request.leftOutCarryOver?.has(carryOverKey(substance, material)) ?? false;

interface Group {
	readonly name: string;
	readonly keys: Set<string>;
	readonly identities: SubstanceIdentity[];
	colourant: boolean;
	doubt: NameDoubt | null;
}

function groupByName(
	compositions: readonly Composition[],
	request: ListRequest,
	rule: MarketRule,
	named: ReadonlyMap<string, AllergenReading>,
	isListed: IsListed
): ReadonlyMap<string, Group> {
	const groups = new Map<string, Group>();
	for (const row of compositions.flatMap(({ rows }) => rows)) {
		if (!row.contributions.some(isListed)) continue;
		const identity = identityOf(request, row.substance);
		const allergen =
			row.use === 'colourant' ? undefined : [...named.values()].find(({ substances }) => substances.has(row.substance));
		const declared = allergen
			? { name: allergen.entry.labelName, doubt: null }
			: declaredName(rule, row, identity, request.names);
		const group = groups.get(declared.name) ?? {
			name: declared.name,
			keys: new Set(),
			identities: [],
			colourant: true,
			doubt: declared.doubt
		};
		group.keys.add(row.key);
		group.identities.push(identity);
		group.colourant &&= row.use === 'colourant';
		group.doubt ??= declared.doubt;
		groups.set(declared.name, group);
	}
	return groups;
}

function directCandidate(
	compositions: readonly Composition[],
	{ name, keys, identities, colourant, doubt }: Group,
	named: ReadonlyMap<string, AllergenReading>,
	isListed: IsListed
): Candidate {
	const allergen = named.get(name) ?? null;
	const select = (part: WeighedPart) =>
		allergen
			? isSource(part) && (keys.has(part.rowKey) || allergen.substances.has(part.substance))
			: keys.has(part.rowKey) && isListed(part);
	const index = identities.map(({ colourIndex }) => colourIndex).find((each) => each !== null) ?? null;
	const perfume = identities.some((identity) => perfumeWord(identity) !== null);
	const sought = { keys, substances: allergen?.substances ?? NO_SUBSTANCES };
	return { name, doubt, select, colourant, index, perfume, allergen, ...measured(compositions, select, sought) };
}

function insideCandidate(compositions: readonly Composition[], reading: AllergenReading): Candidate {
	const select = (part: WeighedPart) => isSource(part) && reading.substances.has(part.substance);
	return {
		name: reading.entry.labelName,
		doubt: null,
		select,
		colourant: false,
		index: null,
		perfume: false,
		allergen: reading,
		...measured(compositions, select, { keys: NO_KEYS, substances: reading.substances })
	};
}

/** Where a name can be found at all, so that nothing else is looked through. */
interface Sought {
	readonly keys: ReadonlySet<string>;
	readonly substances: ReadonlySet<Id<'substance'>>;
}
const NO_KEYS: ReadonlySet<string> = new Set();
const NO_SUBSTANCES: ReadonlySet<Id<'substance'>> = new Set();

function measured(compositions: readonly Composition[], select: Candidate['select'], sought: Sought) {
	const amounts = compositions.map((composition) => {
		const within = materialsWith(composition, sought);
		return { composition, within, share: amountOf(within, select) };
	});
	const most = amounts.reduce((a, b) => (b.share.typical > a.share.typical ? b : a));
	return {
		within: new Map(amounts.map(({ composition, within }) => [composition, within])),
		rows: rowsWith(most.composition, sought).filter((row) =>
			row.contributions.some((each) => select(weighedAs(row, each)))
		),
		share: united(amounts.map(({ share }) => share)),
		inEvery: amounts.every(({ share }) => share.high > 0n)
	};
}

function materialsWith(composition: Composition, { keys, substances }: Sought): readonly WeighedMaterial[] {
	const { byRow, bySubstance } = touching(composition);
	const found = [
		...[...keys].flatMap((key) => byRow.get(key) ?? []),
		...[...substances].flatMap((substance) => bySubstance.get(substance) ?? [])
	];
	return [...new Set(found)];
}

function rowsWith(composition: Composition, { keys, substances }: Sought): readonly CompositionRow[] {
	const { rows, rowsOf } = touching(composition);
	const found = [
		...[...keys].flatMap((key) => rows.get(key) ?? []),
		...[...substances].flatMap((substance) => rowsOf.get(substance) ?? [])
	];
	return [...new Set(found)];
}

/** Over all shades: lowest, highest, and the highest typical. */
function united(shares: readonly Estimate<Percent>[]): Estimate<Percent> {
	const [first, ...others] = shares;
	if (!first) throw new RangeError('a list needs a composition');
	return others.reduce((a, b) => {
		const higher = b.high > a.high || (b.high === a.high && a.highOpen) ? b : a;
		return {
			low: b.low < a.low ? b.low : a.low,
			high: higher.high,
			highOpen: higher.highOpen,
			typical: b.typical > a.typical ? b.typical : a.typical,
			basis: weakest([a.basis, b.basis])
		};
	}, first);
}

export const weighedAs = (row: CompositionRow, { constituent, role, part }: Contribution): WeighedPart => ({
	rowKey: row.key,
	constituent,
	substance: row.substance,
	role,
	parent: null,
	share: part
});

/** Heaviest first. */
export const byWeight = (a: Candidate, b: Candidate) => compare(b.share.typical, a.share.typical);
