import { z } from 'zod';
import type { IsoDate, Percent } from '../domain/quantity/units';

export const standingSchema = z.enum(['confirmed', 'fromMemory', 'commonPractice']);
export type Standing = z.infer<typeof standingSchema>;

/** An article or entry as the rule reference shows it: our own short words, never the official text. */
export const ruleTextSchema = z.object({
	act: z.string().regex(/^[a-z0-9-]+$/),
	entry: z.string().regex(/^[a-z0-9-]+$/),
	citation: z.string().min(1),
	title: z.string().min(1),
	text: z.string().min(1),
	source: z.string().min(1),
	from: z.iso.date().nullable(),
	until: z.iso.date().nullable(),
	standing: standingSchema
});
export type RuleText = z.infer<typeof ruleTextSchema>;

export const allergenRowSchema = z.object({
	entry: z.string().regex(/^\d{1,3}[a-z]?$/),
	labelName: z.string().min(1),
	before2023: z.boolean(),
	members: z.array(z.string().min(1)).min(1),
	/** Names that suppliers write for members whose name in the annex is another. */
	alsoKnown: z.array(z.string().min(1)).optional(),
	cas: z.array(z.string().regex(/^\d{2,7}-\d{2}-\d$/))
});
export type AllergenRow = z.infer<typeof allergenRowSchema>;

/** An allergen entry as the core reads it. */
export interface Allergen {
	readonly ruleId: string;
	readonly labelName: string;
	readonly members: readonly { readonly inci: string; readonly cas: readonly string[] }[];
	readonly leaveOnAbove: Percent;
	readonly rinseOffAbove: Percent;
	readonly placedFrom: IsoDate | null;
	readonly firstSoldFrom?: IsoDate;
}
