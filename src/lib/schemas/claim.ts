import { z } from 'zod';

export const CRITERIA = [
	'legalCompliance',
	'truthfulness',
	'evidentialSupport',
	'honesty',
	'fairness',
	'informedDecision'
] as const;
export type CriterionName = (typeof CRITERIA)[number];

/** Kinds of claim by the evidence that they usually need. */
export const CLAIM_KINDS = [
	'composition',
	'ingredientEfficacy',
	'hydration',
	'skin',
	'hair',
	'hygiene',
	'sunProtection',
	'perception',
	'tested',
	'freeFrom',
	'natural',
	'vegan',
	'comparative',
	'other'
] as const;

export const WORDING_LIMIT = 500;
export const ANSWER_LIMIT = 4000;

export const newClaimSchema = z.object({
	wording: z.string().trim().min(1).max(WORDING_LIMIT).default(''),
	kind: z.enum(CLAIM_KINDS).default('other')
});
export type NewClaim = z.infer<typeof newClaimSchema>;

export const answersSchema = z.object({
	claimId: z.uuid(),
	rev: z.coerce.number().int().positive(),
	wording: z.string().trim().min(1).max(WORDING_LIMIT),
	...(Object.fromEntries(CRITERIA.map((criterion) => [criterion, z.string().trim().max(ANSWER_LIMIT)])) as Record<
		CriterionName,
		z.ZodString
	>)
});
export type Answers = z.infer<typeof answersSchema>;

export const evidenceSchema = z.object({ claimId: z.uuid(), documentId: z.uuid() });
export const claimIdSchema = z.object({ claimId: z.uuid() });
export const evidenceLinkSchema = z.object({ linkId: z.uuid() });
