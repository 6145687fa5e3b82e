import { z } from 'zod';
import { ALLERGEN_LAWS, QUESTIONS } from '../domain/material/questions';
import { parseDecimal, type DecimalFault } from '../domain/quantity/decimal';

export const ANSWERS = ['complete', 'absent', 'present', 'withdrawn'] as const;
export type Answer = (typeof ANSWERS)[number];

const optionalDay = z
	.union([z.iso.date(), z.literal('')])
	.default('')
	.transform((day) => day || null);

export const answerSchema = z
	.object({
		question: z.enum(QUESTIONS).default('composition'),
		answer: z.enum(ANSWERS).default('complete'),
		law: z
			.enum([...ALLERGEN_LAWS, ''])
			.default('')
			.transform((law) => law || null),
		quantifiedFrom: z.string().trim().max(200).default(''),
		documentId: z
			.union([z.uuid(), z.literal('')])
			.default('')
			.transform((id) => id || null),
		dated: optionalDay,
		goodUntil: optionalDay,
		remark: z.string().trim().max(500).default('')
	})
	.superRefine((answer, ctx) => {
		const issue = (path: string, message: string) => ctx.addIssue({ code: 'custom', path: [path], message });
		if (answer.answer === 'withdrawn' && answer.remark === '') issue('remark', 'reasonMissing');
		if (answer.answer !== 'withdrawn' && answer.documentId === null) issue('documentId', 'documentMissing');
		if (answer.dated && answer.goodUntil && answer.goodUntil < answer.dated) issue('goodUntil', 'beforeDated');
		if (answer.question === 'allergens' && answer.answer !== 'withdrawn' && answer.law === null) {
			issue('law', 'lawMissing');
		}
	});
export type AnswerInput = z.infer<typeof answerSchema>;

export const LIMIT_KINDS = ['perfumeCategory', 'supplierMaximum', 'phWindow', 'heatLimit', 'shearLimit'] as const;
export type LimitKind = (typeof LIMIT_KINDS)[number];

/** Stored with six decimals whatever the unit: % of the product, pH, °C, revolutions a minute, mm. */
export const LIMIT_DECIMALS = 6;
const scaled = (whole: number) => BigInt(whole) * 10n ** BigInt(LIMIT_DECIMALS);

interface LimitShape {
	/** Which of the two figures the kind has; of a shear limit, `low` is the least nozzle in mm. */
	readonly low: bigint | null;
	readonly high: bigint | null;
}
/** The largest figure that each kind takes; null where it has none. */
export const LIMIT_SHAPES: Readonly<Record<LimitKind, LimitShape>> = {
	perfumeCategory: { low: null, high: scaled(100) },
	supplierMaximum: { low: null, high: scaled(100) },
	phWindow: { low: scaled(14), high: scaled(14) },
	heatLimit: { low: null, high: scaled(300) },
	shearLimit: { low: scaled(100), high: scaled(50_000) }
};

export type LimitFault = DecimalFault | 'categoryMissing' | 'upsideDown' | 'needless';
const figure = z.string().trim().max(40).default('');

export const useLimitSchema = z
	.object({
		kind: z.enum(LIMIT_KINDS).default('supplierMaximum'),
		category: z.string().trim().max(40).default(''),
		low: figure,
		high: figure,
		documentId: z.union([z.uuid(), z.literal('')]).default(''),
		page: z
			.string()
			.trim()
			.regex(/^$|^[1-9]\d{0,4}$/)
			.default('')
	})
	.superRefine((limit, ctx) => {
		const issue = (path: string, message: string, most: string | null = null) =>
			ctx.addIssue({ code: 'custom', path: [path], message, params: { limit: most } });
		if (limit.documentId === '') issue('documentId', 'documentMissing');
		if (limit.kind === 'perfumeCategory' && limit.category === '') issue('category', 'categoryMissing');
		const shape = LIMIT_SHAPES[limit.kind];
		const read = (['low', 'high'] as const).map((end) => {
			const max = shape[end];
			if (max === null) {
				if (limit[end] !== '') issue(end, 'needless');
				return null;
			}
			const parsed = parseDecimal(limit[end], { decimals: LIMIT_DECIMALS, max });
			if (!parsed.ok) issue(end, parsed.why, parsed.limit);
			return parsed.ok ? parsed.value : null;
		});
		const [low, high] = read;
		if (limit.kind === 'phWindow' && low != null && high != null && low > high) issue('low', 'upsideDown');
	});
export type UseLimitInput = z.infer<typeof useLimitSchema>;

export const withdrawLimitSchema = z.object({ id: z.uuid(), reason: z.string().trim().min(1).max(500).default('') });
