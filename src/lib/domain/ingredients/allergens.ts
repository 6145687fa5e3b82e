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
	return request.allergens.flatMap((entry) => {
		const substances = members(entry);
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
				inForce: entry.placedFrom === null || !isBefore(request.batchDay, entry.placedFrom),
				above: share.typical > limit
			}
		];
	});
}

/**
 * By name first; by CAS number only where no entry knows the name, because an oil of the flower and an oil of the peel can share
 * one number.
 */
function membersOf(identities: readonly SubstanceIdentity[], allergens: readonly AllergenEntry[]) {
	const names = new Set(allergens.flatMap(keysOf));
	return (entry: AllergenEntry): ReadonlySet<Id<'substance'>> => {
		const keys = new Set(keysOf(entry));
		const numbers = new Set(entry.members.flatMap(({ cas }) => cas));
		const isMember = ({ key, cas }: SubstanceIdentity) =>
			keys.has(key) || (!names.has(key) && cas.some((number) => numbers.has(number)));
		return new Set(identities.filter(isMember).map(({ id }) => id));
	};
}

const keysOf = (entry: AllergenEntry) => [entry.labelName, ...entry.members.map(({ inci }) => inci)].map(substanceKey);
