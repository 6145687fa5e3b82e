import { compose } from '$lib/domain/composition/compose';
import type { Composition } from '$lib/domain/composition/types';
import { compareNames } from '$lib/domain/ingredients/names';
import { formatExact } from '$lib/domain/quantity/decimal';
import { compare, type Id } from '$lib/domain/quantity/units';
import type { FamilyColumn, FamilyRow, FamilyView } from '$lib/schemas/family-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import { loadFormula, type FormulaVersionRef, type LoadedMaterials } from '../db/basis';
import { familyOf, type FamilyMember } from '../db/families';
import { formulaByCode, versionRef, versionsOfFormula } from '../db/formulas';
import { withActor, type Trx } from '../db/with-actor';

export interface Read {
	readonly composition: Composition;
	readonly loaded: LoadedMaterials;
}
/** A member of the family, now and with the base's draft in place; null where there is no composition. */
interface Pair {
	readonly column: FamilyColumn;
	readonly now: Read | null;
	readonly then: Read | null;
}

/** A base and every formula that takes it in, side by side. @throws Refused 'not-found' for an unknown code. */
export function readFamily(actor: Actor, code: string): Promise<FamilyView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const versions = await versionsOfFormula(trx, formula.id);
		const released = versions.find(({ state }) => state === 'released');
		const draft = versions.find(({ state }) => state === 'draft');
		const instead = draft && versionRef(formula.id, draft);
		const standing = released ?? draft;
		const base: FamilyColumn = {
			code,
			name: formula.name,
			number: standing?.number ?? 1,
			clients: [],
			baseShare: null,
			pinned: null
		};
		const pairs: Pair[] = [
			{
				column: base,
				now: released ? await readVersion(trx, versionRef(formula.id, released)) : null,
				then: instead ? await readVersion(trx, instead) : null
			}
		];
		for (const member of await familyOf(trx, formula.id)) pairs.push(await pairOf(trx, member, instead));
		return {
			base,
			draft: draft?.number ?? null,
			columns: pairs.map(({ column }) => column),
			byIngredient: rowsOf(pairs, ingredientsIn),
			byMaterial: rowsOf(pairs, materialsIn)
		};
	});
}

export async function readVersion(
	trx: Trx,
	version: FormulaVersionRef,
	instead?: FormulaVersionRef
): Promise<Read | null> {
	const { tree, loaded } = await loadFormula(trx, version, today(), instead);
	const formula = version.formulaId as Id<'formula'>;
	const outcome = compose({ formula, formulas: tree.formulas, materials: loaded.materials });
	return outcome.ok ? { composition: outcome.value, loaded } : null;
}

async function pairOf(trx: Trx, member: FamilyMember, instead: FormulaVersionRef | undefined): Promise<Pair> {
	const { version, name, code, clients, baseShare, pinned } = member;
	const now = await readVersion(trx, version);
	return {
		column: { code, name, number: version.number, clients, baseShare: baseShare ?? restOf(now, member), pinned },
		now,
		then: instead && pinned === null ? await readVersion(trx, version, instead) : null
	};
}

/** What a q.s. line of the base takes: the weight of every line below it together. */
function restOf(read: Read | null, { baseLineId }: FamilyMember): string | null {
	if (!read) return null;
	const { composition } = read;
	const weights = new Map<string, bigint>();
	for (const { contributions } of composition.rows)
		for (const { path, weight } of contributions)
			if (path[0] === baseLineId) weights.set(path.join('/'), weight.typical);
	const sum = [...weights.values()].reduce((total, weight) => total + weight, 0n);
	return formatExact(sum, composition.weightDecimals);
}

export interface Named {
	readonly key: string;
	readonly name: string;
	readonly share: bigint;
	readonly decimals: number;
}

export const ingredientsIn = ({ composition, loaded }: Read): readonly Named[] =>
	composition.rows
		.filter(({ roles }) => roles.has('ingredient') || roles.has('carryOver'))
		.map(({ key, substance, share }) => ({
			key,
			name: loaded.substances.get(substance)?.inci ?? '',
			share: share.typical,
			decimals: composition.shareDecimals
		}));

export const namedText = ({ share, decimals }: Named) => formatExact(share, decimals);

const materialsIn = ({ composition, loaded }: Read): readonly Named[] =>
	composition.weighed.map(({ material, typicalWeight }) => ({
		key: material,
		name: loaded.refs.get(material)?.tradeName ?? '',
		share: typicalWeight,
		decimals: composition.weightDecimals
	}));

/** Heaviest in the base first, then what the variants add. */
function rowsOf(pairs: readonly Pair[], namesIn: (read: Read) => readonly Named[]): FamilyRow[] {
	const held = (read: Read | null) => new Map((read ? namesIn(read) : []).map((named) => [named.key, named]));
	const now = pairs.map((pair) => held(pair.now));
	const then = pairs.map((pair) => held(pair.then));
	const all = new Map([...now, ...then].flatMap((each) => [...each]));
	const [baseNow, baseThen] = [now[0], then[0]];
	const weight = ({ share, decimals }: Named) => share * 10n ** BigInt(40 - decimals);
	const rows = [...all.values()].map((named) => {
		const own = baseNow?.get(named.key) ?? baseThen?.get(named.key);
		return { named, inBase: own !== undefined, order: weight(own ?? named) };
	});
	rows.sort(
		(a, b) =>
			Number(b.inBase) - Number(a.inBase) || compare(b.order, a.order) || compareNames(a.named.name, b.named.name)
	);
	const text = (named: Named | undefined) => (named ? namedText(named) : null);
	return rows.map(({ named, inBase }) => ({
		key: named.key,
		name: named.name,
		inBase,
		now: now.map((each) => text(each.get(named.key))),
		then: then.map((each) => text(each.get(named.key)))
	}));
}
