import { batchSheet, type BatchFault } from '$lib/domain/composition/batch-sheet';
import type { CompositionFault } from '$lib/domain/composition/types';
import { formatExact, parseDecimal } from '$lib/domain/quantity/decimal';
import { formatRatio } from '$lib/domain/quantity/ratio';
import { MASS_DECIMALS, type BatchSheetInput } from '$lib/schemas/compute';
import { Refused } from '../refused';
import { faultViews } from './compute';
import { compositionRequestOf, refuseMissingFormula, refuseWrongIdentities } from './compute-input';

/** Decimals of an exact amount that does not end. */
const EXACT_PLACES = 6;

/** The weighings of one batch. @throws Refused 'invalid' for a size that is no whole number of balance steps. */
export function computeBatchSheet(input: BatchSheetInput) {
	refuseMissingFormula(input);
	refuseWrongIdentities(input);
	const [size, step] = [massOf(input.size), massOf(input.step)];
	if (size % step !== 0n) {
		const message = 'The batch is not a whole number of balance steps.';
		throw new Refused('invalid', { errors: [{ path: 'size', value: input.size, limit: input.step, message }] });
	}
	const outcome = batchSheet(compositionRequestOf(input), { size, step });
	if (!outcome.ok) return { lines: [], faults: faultViews(outcome.faults.filter(isOfComposition), input) };
	return {
		unit: input.unit,
		lines: outcome.value.map(({ material, formulas, amount, exact, takesRounding }) => ({
			material,
			path: [...formulas, material],
			amount: formatExact(amount, MASS_DECIMALS),
			exact: formatRatio(exact, MASS_DECIMALS, EXACT_PLACES, 'nearest'),
			takesRounding
		})),
		total: formatExact(
			outcome.value.reduce((sum, { amount }) => sum + amount, 0n),
			MASS_DECIMALS
		),
		faults: []
	};
}

/** Lots are not corrected in this call, so that only faults of the composition can come. */
const isOfComposition = (fault: BatchFault): fault is CompositionFault =>
	fault.kind !== 'potencyWithoutQs' && fault.kind !== 'potencyAboveQs';

function massOf(text: string): bigint {
	const parsed = parseDecimal(text, { decimals: MASS_DECIMALS });
	if (!parsed.ok) throw new RangeError(`the schema let a wrong mass through: ${text}`);
	return parsed.value;
}
