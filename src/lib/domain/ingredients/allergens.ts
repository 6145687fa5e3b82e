import { amountOf } from '../composition/amounts';
import type { Composition, WeighedPart } from '../composition/types';
import { substanceKey } from '../material/substance-key';
import { isBefore } from '../quantity/day';
import type { Estimate } from '../quantity/range';
import type { Id, Percent } from '../quantity/units';
import type { AllergenEntry, ListRequest, SubstanceIdentity } from './types';

/** What one allergen entry finds in a composition, over perfumes, oils, extracts and direct use together. */
export interface AllergenReading {
	readonly entry: AllergenEntry;
	readonly substances: ReadonlySet<Id<'substance'>>;
	readonly share: Estimate<Percent>;
	/** On the composition's own scale. */
	readonly limit: Percent;
	/** On the batch day the entry must be obeyed. */
	readonly inForce: boolean;
	readonly above: boolean;
}

/** Impurities and processing aids are no source of a named allergen; everything that is there on purpose is. */
export const isSource = (part: WeighedPart) => part.role !== 'impurity' && part.role !== 'processingAid';

/**
 * Reads every entry against the composition. Above means strictly above the typical sum's threshold (leave-on or rinse-off,
 * in 10⁻¹⁶ % before scaling). Source: Regulation (EC) 1223/2009, Annex III as amended by (EU) 2023/1545.
 */
export function readAllergens(composition: Composition, request: ListRequest): readonly AllergenReading[] {
	const scale = 10n ** BigInt(composition.shareDecimals - 16);
	const present = new Set(composition.rows.map((row) => row.substance));
	const identities = [...request.substances.values()].filter((identity) => present.has(identity.id));
	const members = membersOf(identities, request.allergens);
	return request.allergens.flatMap((entry, at) => {
		const substances = members[at] ?? new Set();
		if (substances.size === 0) return [];
		const share = amountOf(composition.weighed, (part) => substances.has(part.substance) && isSource(part));
		if (share.high === 0n) return [];
		const limit = ((request.stay === 'leave-on' ? entry.leaveOnAbove : entry.rinseOffAbove) * scale) as Percent;
		return [
			{
				entry,
				substances,
				share,
				limit,
				inForce: isInForce(entry, request),
				above: share.typical > limit
			}
		];
	});
}

/** A product whose first sale nobody has told counts as new: naming one name more is lawful, one less is not. */
function isInForce({ placedFrom, firstSoldFrom }: AllergenEntry, { batchDay, firstSold }: ListRequest): boolean {
	if (placedFrom === null || !isBefore(batchDay, placedFrom)) return true;
	return firstSoldFrom !== undefined && !isBefore(firstSold ?? batchDay, firstSoldFrom);
}

interface EntryKeys {
	readonly keys: ReadonlySet<string>;
	readonly numbers: ReadonlySet<string>;
}
/** Keys cost more than everything else here, and the same rows are read for every list. */
const KNOWN = new WeakMap<
	readonly AllergenEntry[],
	{ readonly all: ReadonlySet<string>; readonly of: readonly EntryKeys[] }
>();

function keysOf(allergens: readonly AllergenEntry[]) {
	const known = KNOWN.get(allergens);
	if (known) return known;
	const of = allergens.map(({ labelName, members }) => ({
		keys: new Set([labelName, ...members.map(({ inci }) => inci)].map(substanceKey)),
		numbers: new Set(members.flatMap(({ cas }) => cas))
	}));
	const made = { all: new Set(of.flatMap(({ keys }) => [...keys])), of };
	KNOWN.set(allergens, made);
	return made;
}

/**
 * By name first; by CAS number only where no entry knows the name, because an oil of the flower and an oil of the peel can share
 * one number.
 */
function membersOf(identities: readonly SubstanceIdentity[], allergens: readonly AllergenEntry[]) {
	const { all, of } = keysOf(allergens);
	const unnamed = identities.filter(({ key, cas }) => cas.length > 0 && !all.has(key));
	const named = identities.filter(({ key }) => all.has(key));
	return of.map(({ keys, numbers }): ReadonlySet<Id<'substance'>> => {
		const byName = named.filter(({ key }) => keys.has(key));
		const byNumber = unnamed.filter(({ cas }) => cas.some((number) => numbers.has(number)));
		return new Set([...byName, ...byNumber].map(({ id }) => id));
	});
}
