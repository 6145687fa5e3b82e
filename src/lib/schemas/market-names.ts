import { z } from 'zod';
import type { NameBook } from '../domain/ingredients/types';
import { substanceKey } from '../domain/material/substance-key';

const word = z.string().trim().min(1).max(120);

export const plantNameSchema = z.object({ latin: word, english: word, french: word });
export type PlantName = z.infer<typeof plantNameSchema>;

export const technicalNameSchema = z.object({
	technical: word,
	inci: word,
	french: word,
	others: z.array(word).optional()
});
export type TechnicalName = z.infer<typeof technicalNameSchema>;

export const colourNameSchema = z.object({
	number: z.string().regex(/^\d{5}$/),
	suffix: z.string().regex(/^:\d$/).optional(),
	form: z.enum(['acid', 'sodium', 'calcium', 'ammonium']).optional(),
	short: word,
	full: word,
	certified: z.boolean()
});
export type ColourName = z.infer<typeof colourNameSchema>;

/** The rows as the core looks them up. @throws ZodError for a row of the wrong shape. */
export const nameBookOf = (rows: {
	readonly plants: readonly PlantName[];
	readonly technical: readonly TechnicalName[];
	readonly colours: readonly ColourName[];
}): NameBook => ({
	plants: new Map(
		z
			.array(plantNameSchema)
			.parse(rows.plants)
			.map(({ latin, english }) => [substanceKey(latin), english])
	),
	technical: new Map(
		z
			.array(technicalNameSchema)
			.parse(rows.technical)
			.map(({ technical, inci }) => [substanceKey(technical), { technical, inci }])
	),
	colours: z.array(colourNameSchema).parse(rows.colours)
});
