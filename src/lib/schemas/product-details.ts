import { z } from 'zod';
import { productSchema } from './product';

/** What may be changed of a product without moving its composition or its list. */
export const productDetailsSchema = productSchema
	.pick({
		name: true,
		brandName: true,
		functionText: true,
		clientCode: true,
		responsibleName: true,
		responsibleAddress: true,
		originCountry: true
	})
	.extend({ rev: z.coerce.number().int().positive().default(1) });
export type ProductDetails = z.infer<typeof productDetailsSchema>;

export const assessorSchema = z.object({ personId: z.uuid().default('') });
