import { z } from 'zod';
import { parseDecimal } from '../domain/quantity/decimal';
import { LINE_DECIMALS, WHOLE_LINE } from '../domain/quantity/units';
import { CODE_PATTERN } from './material';

export const newFormulaSchema = z.object({
	code: z.string().trim().toUpperCase().regex(CODE_PATTERN).default(''),
	name: z.string().trim().min(1).max(200).default('')
});
export type NewFormula = z.infer<typeof newFormulaSchema>;

export const readShare = (text: string) => parseDecimal(text, { decimals: LINE_DECIMALS, max: WHOLE_LINE });

const share = z
	.string()
	.max(60)
	.default('')
	.superRefine((text, ctx) => {
		if (text.trim() === '') return;
		const parsed = readShare(text);
		if (!parsed.ok) ctx.addIssue({ code: 'custom', message: parsed.why, params: { limit: parsed.limit } });
	});

export const formulaLineSchema = z
	.object({
		id: z.uuid(),
		phase: z.string().trim().min(1).max(8).default('A'),
		kind: z.enum(['material', 'formula']),
		code: z.string().trim().min(1).max(32),
		percent: share,
		/** The lowest and highest amount of an adjuster; empty where it has none. */
		min: share,
		max: share,
		qs: z.boolean().default(false),
		/** The version of a bulk that answers whatever is released later; null follows the newest one. */
		pinned: z.number().int().positive().nullable().default(null),
		pinReason: z.string().trim().max(500).default('')
	})
	.superRefine((line, ctx) => {
		const issue = (path: string, message: string) => ctx.addIssue({ code: 'custom', path: [path], message });
		if (line.pinned !== null && line.kind !== 'formula') issue('pinned', 'pinnedMaterial');
		if (line.pinned !== null && line.pinReason === '') issue('pinReason', 'pinReasonMissing');
		if (line.qs && (line.min !== '' || line.max !== '')) issue('min', 'rangeOnQs');
	});
export type FormulaLineInput = z.infer<typeof formulaLineSchema>;

export const MOST_LINES = 500;
export const formulaDraftSchema = z
	.object({ rev: z.number().int().positive(), lines: z.array(formulaLineSchema).max(MOST_LINES) })
	.superRefine(({ lines }, ctx) => {
		const qs = lines.flatMap((line, index) => (line.qs ? [index] : []));
		for (const index of qs.slice(1))
			ctx.addIssue({ code: 'custom', path: ['lines', index, 'qs'], message: 'secondQs' });
	});
export type FormulaDraft = z.infer<typeof formulaDraftSchema>;
