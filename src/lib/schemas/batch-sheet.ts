import { z } from 'zod';
import { parseDecimal } from '../domain/quantity/decimal';

export const GRAM_DECIMALS = 6;
const LARGEST_GRAMS = 10n ** 14n;
export const LOT_DECIMALS = 4;
const LARGEST_LOT = 200n * 10n ** 4n;

/** @returns the value in 10^-decimals, or null */
const positive = (text: string, decimals: number, max: bigint) => {
	const parsed = parseDecimal(text, { decimals, max });
	return parsed.ok && parsed.value > 0n ? parsed.value : null;
};
export const gramsOf = (text: string) => positive(text, GRAM_DECIMALS, LARGEST_GRAMS);
/** Content of a lot in % of the nominal one. */
export const lotOf = (text: string) => positive(text, LOT_DECIMALS, LARGEST_LOT);

const grams = z
	.string()
	.trim()
	.max(40)
	.refine((text) => gramsOf(text) !== null, { message: 'amount' });

/** A batch in g, weighed in steps of g; lots by material code. */
export const batchRequestSchema = z
	.object({
		size: grams.default('1000'),
		step: grams.default('0.01'),
		lots: z.record(z.string().max(32), z.string().trim().max(20)).default({})
	})
	.superRefine(({ size, step, lots }, ctx) => {
		const [whole, one] = [gramsOf(size), gramsOf(step)];
		if (whole !== null && one !== null && whole % one !== 0n)
			ctx.addIssue({ code: 'custom', path: ['size'], message: 'notWholeSteps' });
		for (const [code, text] of Object.entries(lots))
			if (text !== '' && lotOf(text) === null) ctx.addIssue({ code: 'custom', path: ['lots', code], message: 'lot' });
	});
export type BatchRequest = z.infer<typeof batchRequestSchema>;

const LOT_PREFIX = 'lot.';

/** The request as an address carries it: size, step, and one `lot.CODE` for each corrected lot. */
export const batchRequestOf = (params: URLSearchParams) => ({
	...(params.has('size') ? { size: params.get('size') } : {}),
	...(params.has('step') ? { step: params.get('step') } : {}),
	lots: Object.fromEntries(
		[...params].flatMap(([name, value]) =>
			name.startsWith(LOT_PREFIX) && value.trim() !== '' ? [[name.slice(LOT_PREFIX.length), value]] : []
		)
	)
});
export const lotField = (code: string) => `${LOT_PREFIX}${code}`;

export interface BatchLineView {
	readonly code: string;
	readonly name: string;
	readonly phase: string;
	/** Names of the bulks above it, outermost first. */
	readonly within: readonly string[];
	readonly amount: string;
	readonly exact: string;
	readonly takesRounding: boolean;
	readonly lot: string;
}
export interface BatchView {
	readonly lines: readonly BatchLineView[];
	readonly total: string;
	readonly faults: readonly string[];
}
