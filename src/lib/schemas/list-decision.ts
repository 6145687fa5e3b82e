import { z } from 'zod';
import { marketSchema } from './market';

const MOST_NAMES = 2000;

/** An empty order takes the usual one back. */
export const arrangementSchema = z.object({
	market: marketSchema,
	names: z.array(z.string().trim().min(1).max(300)).max(MOST_NAMES)
});
export type ArrangementInput = z.infer<typeof arrangementSchema>;

export const carryOverSchema = z.object({
	substanceId: z.uuid(),
	materialId: z.uuid(),
	leftOut: z.enum(['yes', 'no']).transform((answer) => answer === 'yes'),
	reason: z.string().trim().min(1).max(1000)
});
export type CarryOverInput = z.infer<typeof carryOverSchema>;
