import { amountOf } from '../composition/compose';
import type { Composition, WeighedPart } from '../composition/types';
import { substanceKey } from '../material/substance-key';
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
const isSource = (part: WeighedPart) => part.role !== 'impurity' && part.role !== 'processingAid';

/**
 * Reads every entry against the composition. Above means strictly above the typical sum's threshold (leave-on or rinse-off,
 * in 10⁻¹⁶ % before scaling). Source: Regulation (EC) 1223/2009, Annex III as amended by (EU) 2023/1545.
 */
export function readAllergens(composition: Composition, request: ListRequest): readonly AllergenReading[] {
	const scale = 10n ** BigInt(composition.shareDecimals - 16);
	const present = new Set(composition.rows.map((row) => row.substance));
	const identities = [...request.substances.values()].filter((identity) => present.has(identity.id));
	return request.allergens.flatMap((entry) => {
		const substances = new Set(identities.filter((identity) => isMember(identity, entry)).map(({ id }) => id));
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
				inForce: entry.placedFrom === null || request.batchDay >= entry.placedFrom,
				above: share.typical > limit
			}
		];
	});
}

/** By name first; by CAS number where the supplier used another name. */
function isMember(identity: SubstanceIdentity, entry: AllergenEntry): boolean {
	if (substanceKey(entry.labelName) === identity.key) return true;
	return entry.members.some(
		(member) => substanceKey(member.inci) === identity.key || member.cas.some((number) => identity.cas.includes(number))
	);
}
