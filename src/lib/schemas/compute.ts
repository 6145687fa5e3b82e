import { z } from 'zod';
import { parseDecimal } from '../domain/quantity/decimal';
import { isoDate } from '../domain/quantity/day';
import { LINE_DECIMALS, PART_DECIMALS, WHOLE_LINE, WHOLE_PART } from '../domain/quantity/units';
import { MARKETS } from '../domain/ingredients/types';
import { AGES, PRODUCT_TYPES, SITES, SPRAYS, STAYS } from './product';

const decimalText = (decimals: number, max: bigint) =>
	z.string().superRefine((text, ctx) => {
		const parsed = parseDecimal(text, { decimals, max });
		if (parsed.ok) return;
		ctx.addIssue({ code: 'custom', message: parsed.why, params: { limit: parsed.limit }, input: text });
	});

/** % of the material, up to eight decimals. */
const partPercent = decimalText(PART_DECIMALS, WHOLE_PART);
/** % w/w of the formula, up to six decimals. */
const linePercent = decimalText(LINE_DECIMALS, WHOLE_LINE);
const name = z.string().trim().min(1).max(300);
const key = z.string().min(1).max(120);
const day = z.string().refine((text) => isoDate(text) !== null, { message: 'notADate' });

export const constituentSchema = z
	.object({
		inci: name,
		cas: z.string().max(20).optional(),
		ec: z.string().max(20).optional(),
		min: partPercent.optional(),
		typical: partPercent.optional(),
		max: partPercent.optional(),
		nano: z.boolean().default(false),
		role: z.enum(['ingredient', 'carryOver', 'impurity', 'processingAid']).default('ingredient'),
		use: z.enum(['colourant', 'uvFilter', 'hairDye', 'preservative', 'other']).default('other'),
		ofWhich: name.optional()
	})
	.strict();

export const lineSchema = z
	.object({
		material: key.optional(),
		formula: key.optional(),
		percent: linePercent.optional(),
		min: linePercent.optional(),
		max: linePercent.optional(),
		qs: z.boolean().default(false)
	})
	.strict()
	.superRefine((line, ctx) => {
		if ((line.material === undefined) === (line.formula === undefined)) {
			ctx.addIssue({ code: 'custom', message: 'materialOrFormula' });
		}
		if (line.qs === (line.percent !== undefined))
			ctx.addIssue({ code: 'custom', path: ['percent'], message: 'percentOrQs' });
	});

/** A shade adds fixed amounts of materials; the formula's q.s. line gives way. */
export const shadeLineSchema = z
	.object({ material: key, percent: linePercent })
	.strict()
	.transform((line) => ({ ...line, qs: false, formula: undefined, min: undefined, max: undefined }));

export const computeInputSchema = z.object({
	materials: z.record(
		key,
		z.object({ name: z.string().max(300).optional(), constituents: z.array(constituentSchema).max(1000) })
	),
	formulas: z.record(key, z.object({ lines: z.array(lineSchema).max(1000) })),
	formula: key,
	shades: z.record(key, z.array(shadeLineSchema).min(1).max(100)).optional(),
	use: z
		.object({
			type: z.enum(PRODUCT_TYPES).optional(),
			stay: z.enum(STAYS),
			sites: z.array(z.enum(SITES)).optional(),
			oral: z.boolean().optional(),
			spray: z.enum(SPRAYS).optional(),
			ages: z.array(z.enum(AGES).or(z.string().max(40))).optional(),
			professional: z.boolean().optional(),
			usedAs: z.string().max(20).optional(),
			ph: z.array(z.string().max(10)).max(2).optional()
		})
		.optional(),
	batch: z.object({ placed: day, firstSold: day.optional() }).optional(),
	markets: z.array(z.enum(MARKETS)).min(1).optional(),
	complete: z
		.array(z.object({ material: key, question: z.string().max(60), document: z.string().max(300), date: day }))
		.optional(),
	arrangement: z.partialRecord(z.enum(MARKETS), z.array(name).min(1).max(2000)).optional()
});
export type ComputeInput = z.infer<typeof computeInputSchema>;

export const MASS_DECIMALS = 6;
const mass = decimalText(MASS_DECIMALS, 10n ** 15n).refine((text) => /[1-9]/.test(text), { message: 'notPositive' });

export const batchSheetInputSchema = computeInputSchema
	.pick({ materials: true, formulas: true, formula: true })
	.extend({ size: mass, unit: z.enum(['g', 'kg']).default('g'), step: mass });
export type BatchSheetInput = z.infer<typeof batchSheetInputSchema>;

export const tokenRequestSchema = z.object({ email: z.string().min(1).max(254), password: z.string().min(1).max(200) });
