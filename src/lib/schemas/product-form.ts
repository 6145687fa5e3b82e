import type { z } from 'zod';
import { packSchema, productSchema, type ProductInput } from './product';

/** The product with its first pack in one flat form, so that it can be sent without script. */
export const productFormSchema = productSchema.omit({ pack: true, sites: true, ages: true, spray: true }).extend({
	packName: packSchema.shape.name,
	packSize: packSchema.shape.size,
	packUnit: packSchema.shape.unit,
	packGtin: packSchema.shape.gtin
});
export type ProductForm = z.infer<typeof productFormSchema>;

export const productOf = ({ packName, packSize, packUnit, packGtin, ...product }: ProductForm): ProductInput => ({
	...product,
	sites: [],
	ages: ['adult'],
	spray: 'none',
	pack: { name: packName, size: packSize, unit: packUnit, gtin: packGtin }
});
