import { z } from 'zod';

const REASON_LIMIT = 2000;

export const needDecisionSchema = z.object({
	need: z.string().min(1).max(80),
	applicable: z.enum(['true', 'false']).transform((text) => text === 'true'),
	reason: z.string().trim().min(1).max(REASON_LIMIT)
});
export const shareSchema = z.object({
	number: z.coerce.number().int().positive(),
	why: z.string().trim().min(1).max(1000)
});
