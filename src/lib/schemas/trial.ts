import { z } from 'zod';
import { parseDecimal } from '../domain/quantity/decimal';

export const VERDICTS = ['good', 'nearly', 'no'] as const;
export type Verdict = (typeof VERDICTS)[number];
const PH_MAX = 1400n;
const VISCOSITY_MAX = 10n ** 12n;

/** An optional figure with two decimals; kept with "." as its sign. */
const measured = (max: bigint) =>
	z
		.string()
		.trim()
		.max(20)
		.default('')
		.refine((text) => text === '' || parseDecimal(text, { decimals: 2, max }).ok, { message: 'measured' })
		.transform((text) => (text === '' ? null : text.replace(',', '.')));

export const trialSchema = z.object({
	madeOn: z.iso.date().default(''),
	ph: measured(PH_MAX),
	viscosity: measured(VISCOSITY_MAX),
	verdict: z.enum(VERDICTS).default('nearly'),
	remark: z.string().trim().max(2000).default(''),
	pictureId: z.union([z.uuid(), z.literal('')]).default('')
});
export type TrialInput = z.infer<typeof trialSchema>;

export const trialNumberSchema = z.object({ number: z.coerce.number().int().positive() });

export interface TrialView {
	readonly number: number;
	readonly madeOn: string;
	readonly ph: string | null;
	readonly viscosity: string | null;
	readonly verdict: Verdict;
	readonly remark: string;
	readonly pictureId: string | null;
	readonly by: string;
	readonly lines: number;
}
