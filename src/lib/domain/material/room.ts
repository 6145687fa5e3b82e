import type { Range } from '../quantity/range';
import { least, most, sum, WHOLE_PART, type Id, type PartShare } from '../quantity/units';
import { NOTHING, stated } from './stated';
import type { Constituent } from './types';

/**
 * The room that the others leave each constituent of the sum, whatever is said of it itself: from 100 % less the others'
 * highest figures to 100 % less their least, in 10⁻⁸ % of the material. A minimum above the room or a maximum below it empties
 * the set of possible compositions. Null where the others alone already exceed 100 %.
 */
export function roomOf(constituents: readonly Constituent[]): ReadonlyMap<Id<'constituent'>, Range<PartShare> | null> {
	const parts = constituents.filter(({ place }) => place === 'inSum').map(stated);
	const lows = sum(parts.map(({ low }) => low));
	const highs = sum(parts.map(({ high }) => high));
	return new Map(
		parts.map(({ of, low, high }) => {
			const room = (WHOLE_PART - (lows - low)) as PartShare;
			const floor = most(NOTHING, (WHOLE_PART - (highs - high)) as PartShare);
			return [of.id, room < 0n ? null : { low: floor, high: least(room, WHOLE_PART), highOpen: false }];
		})
	);
}
