import { z } from 'zod';
import type { LabelContent } from '../domain/label/types';
import { CONTENT_UNITS } from '../domain/label/types';

/** A year's months, five times over: beyond this a figure is a slip of the keyboard. */
export const MOST_MONTHS = 60;
/** Art. 19(1)(c): a date is no longer mandatory above thirty months. */
export const LONGEST_BEST_BEFORE = 30;
export const TEXT_LIMIT = 2000;
export const COMMENT_LIMIT = 1000;
export const BATCH_LIMIT = 60;

export const DURABILITIES = ['open', 'bestBefore', 'periodAfterOpening', 'notNeeded'] as const;
export type DurabilityChoice = (typeof DURABILITIES)[number];

const line = (limit: number) => z.string().trim().max(limit).default('');

/** What an officer edits of a draft; size and unit are the pack's, the list is the composition's. */
export const copyDraftSchema = z
	.object({
		rev: z.coerce.number().int().min(1).default(1),
		brand: line(200),
		name: line(200),
		function: line(300),
		eMark: z.boolean().default(false),
		directions: line(TEXT_LIMIT),
		precautions: line(TEXT_LIMIT),
		durability: z.enum(DURABILITIES).default('open'),
		months: line(4),
		reason: line(300),
		batch: line(120),
		responsibleName: line(200),
		responsibleAddress: line(400),
		imported: z.boolean().default(false),
		origin: line(80)
	})
	.superRefine((draft, ctx) => {
		const fault = (path: 'months' | 'reason', message: string, params: Record<string, string> = {}) =>
			ctx.addIssue({ code: 'custom', path: [path], message, params });
		if (draft.durability === 'notNeeded' && draft.reason === '') fault('reason', 'reasonMissing');
		if (draft.durability !== 'bestBefore' && draft.durability !== 'periodAfterOpening') return;
		const most = draft.durability === 'bestBefore' ? LONGEST_BEST_BEFORE : MOST_MONTHS;
		if (!/^\d{1,3}$/.test(draft.months) || Number(draft.months) < 1) fault('months', 'monthsNotWhole');
		else if (Number(draft.months) > most) fault('months', 'monthsAboveMost', { limit: String(most) });
	});
export type CopyDraft = z.infer<typeof copyDraftSchema>;

/** The form of a content, for the page that edits it. */
export const draftOf = (rev: number, content: LabelContent): CopyDraft => {
	const { durability } = content;
	return {
		rev,
		brand: content.brand,
		name: content.name,
		function: content.function,
		eMark: content.content.eMark,
		directions: content.directions,
		precautions: content.precautions,
		durability: durability?.kind ?? 'open',
		months: durability && 'months' in durability ? String(durability.months) : '',
		reason: durability?.kind === 'notNeeded' ? durability.reason : '',
		batch: content.batch,
		responsibleName: content.responsible.name,
		responsibleAddress: content.responsible.address,
		imported: content.imported,
		origin: content.origin
	};
};

/** A content as it stands in the database. */
export const labelContentSchema: z.ZodType<LabelContent> = z.object({
	form: z.literal(1),
	brand: z.string(),
	name: z.string(),
	function: z.string(),
	content: z.object({ size: z.string(), unit: z.enum(CONTENT_UNITS), eMark: z.boolean() }),
	directions: z.string(),
	precautions: z.string(),
	ingredients: z.string(),
	durability: z.nullable(
		z.discriminatedUnion('kind', [
			z.object({ kind: z.literal('bestBefore'), months: z.number().int() }),
			z.object({ kind: z.literal('periodAfterOpening'), months: z.number().int() }),
			z.object({ kind: z.literal('notNeeded'), reason: z.string() })
		])
	),
	batch: z.string(),
	responsible: z.object({ name: z.string(), address: z.string() }),
	imported: z.boolean(),
	origin: z.string()
});

/** Which released versions a frozen copy was made from. */
export const copyBasisSchema = z.object({
	formulaCode: z.string(),
	formulaNumber: z.number().int(),
	releasedOn: z.string(),
	/** Counts the sets of released versions that this product's copies were made from. */
	number: z.number().int(),
	hash: z.string(),
	ruleBook: z.string(),
	/** Names at the places that were not settled, for which a reason was recorded. */
	asked: z.array(z.string())
});
export type CopyBasis = z.infer<typeof copyBasisSchema>;

export const newCopySchema = z.object({ packId: z.uuid(), market: z.string().min(1).max(10) });
export const copyIdSchema = z.object({ copyId: z.uuid() });
export const labelAddressSchema = z.object({ copyId: z.uuid() });
export const reasonSchema = copyIdSchema.extend({ reason: z.string().trim().max(COMMENT_LIMIT).default('') });
export const sendBackSchema = copyIdSchema.extend({ comment: z.string().trim().min(1).max(COMMENT_LIMIT) });
export const clientApprovalSchema = copyIdSchema.extend({ contentHash: z.string().regex(/^[0-9a-f]{64}$/) });
export const firstBatchSchema = copyIdSchema.extend({
	firstBatch: z.string().trim().min(1).max(BATCH_LIMIT),
	lastBatch: z.string().trim().max(BATCH_LIMIT).default('')
});
export type FirstBatch = z.infer<typeof firstBatchSchema>;

export const DOWNLOAD_FORMS = ['pdf', 'txt', 'json'] as const;
export type DownloadForm = (typeof DOWNLOAD_FORMS)[number];
export const downloadFormSchema = z.enum(DOWNLOAD_FORMS).catch('pdf');
export const issueNumberSchema = z.coerce.number().int().min(1).max(1_000_000);

/** Which pack, market and copy a page shows; what does not fit falls back to the newest. */
export const labelQuerySchema = z.object({
	pack: z.uuid().nullable().catch(null),
	market: z.string().max(10).nullable().catch(null),
	copy: z.uuid().nullable().catch(null)
});
export type LabelQuery = z.infer<typeof labelQuerySchema>;
