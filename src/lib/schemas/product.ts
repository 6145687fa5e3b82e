import { z } from 'zod';

/** The product types of the SCCS exposure table, and four it does not name. */
export const PRODUCT_TYPES = [
	'shower-gel',
	'hand-wash-soap',
	'shampoo',
	'hair-conditioner',
	'body-lotion',
	'face-cream',
	'hand-cream',
	'deodorant-non-spray',
	'deodorant-spray',
	'hair-styling',
	'liquid-foundation',
	'make-up-remover',
	'eye-shadow',
	'mascara',
	'eyeliner',
	'lipstick',
	'toothpaste',
	'mouthwash',
	'sunscreen',
	'oxidative-hair-dye',
	'semi-permanent-hair-dye',
	'fragrance',
	'face-mask',
	'artificial-nails',
	'other'
] as const;
export const SITES = ['face', 'body', 'hands', 'scalp', 'hair', 'lips', 'eyes', 'nails', 'underarm', 'mouth'] as const;
export const AGES = ['adult', 'children-under-3', 'children-3-to-12'] as const;
export const STAYS = ['leave-on', 'rinse-off'] as const;
export const SPRAYS = ['none', 'pump', 'aerosol'] as const;
export const UNITS = ['ml', 'g'] as const;

const amountPattern = /^\d{1,6}([.,]\d{1,3})?$/;

/** Check digit of a GTIN (GS1 General Specifications, modulo 10 with weights 3 and 1). */
export function gtinCheckDigit(digits: string): number {
	const sum = [...digits]
		.reverse()
		.reduce((total, digit, index) => total + Number(digit) * (index % 2 === 0 ? 3 : 1), 0);
	return (10 - (sum % 10)) % 10;
}

const gtinSchema = z
	.string()
	.trim()
	.superRefine((value, ctx) => {
		if (value === '') return;
		if (!/^(\d{8}|\d{12,14})$/.test(value)) {
			ctx.addIssue({ code: 'custom', message: 'gtin-length', params: { value } });
			return;
		}
		const right = gtinCheckDigit(value.slice(0, -1));
		if (right !== Number(value.at(-1))) ctx.addIssue({ code: 'custom', message: `gtin-check-digit:${right}` });
	});

export const packSchema = z.object({
	name: z.string().trim().min(1).max(120).default(''),
	size: z.string().trim().regex(amountPattern, 'amount').default(''),
	unit: z.enum(UNITS).default('ml'),
	gtin: gtinSchema.default('')
});

export const productSchema = z.object({
	clientId: z.uuid().default(''),
	name: z.string().trim().min(1).max(200).default(''),
	brandName: z.string().trim().min(1).max(200).default(''),
	functionText: z.string().trim().min(1).max(300).default(''),
	productType: z.enum(PRODUCT_TYPES).default('other'),
	stay: z.enum(STAYS).default('leave-on'),
	sites: z.array(z.enum(SITES)).default([]),
	ages: z.array(z.enum(AGES)).min(1).default(['adult']),
	spray: z.enum(SPRAYS).default('none'),
	formulaCode: z.string().trim().min(1).max(32).default(''),
	clientCode: z.string().trim().max(60).default(''),
	responsibleName: z.string().trim().min(1).max(200).default(''),
	responsibleAddress: z.string().trim().min(1).max(400).default(''),
	originCountry: z.string().trim().max(80).default(''),
	pack: packSchema.default({ name: '', size: '', unit: 'ml', gtin: '' })
});
/** The words of a product that a person writes, in the order of its forms. */
export const PRODUCT_WORDS = [
	'name',
	'brandName',
	'functionText',
	'clientCode',
	'responsibleName',
	'responsibleAddress',
	'originCountry'
] as const satisfies readonly (keyof ProductInput)[];
export type ProductInput = z.infer<typeof productSchema>;
export type PackInput = z.infer<typeof packSchema>;

/** An address part made from a name: small letters and digits joined by hyphens. */
export const slugOf = (name: string) =>
	name
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.replace(/^-+|-+$/g, '')
		.slice(0, 80);
