import { z } from 'zod';
import { casFault, ecFault } from '../domain/material/identifiers';
import type { Declared } from '../domain/material/types';
import { parseDecimal, type DecimalFault } from '../domain/quantity/decimal';
import { PART_DECIMALS, WHOLE_PART, type PartShare } from '../domain/quantity/units';

export const CODE_PATTERN = /^[A-Z0-9][A-Z0-9-]{0,31}$/;
export const USES = ['other', 'preservative', 'uvFilter', 'colourant', 'hairDye'] as const;
/** What a row of the sheet may be: something in the sum, or a part of another row. */
export const ROW_ROLES = ['ingredient', 'carryOver', 'impurity', 'processingAid', 'ofWhich'] as const;
export const ORIGINS = ['plant', 'animal', 'mineral', 'synthetic', 'biotechnological', 'mixed'] as const;

export const newMaterialSchema = z.object({
	code: z.string().trim().toUpperCase().regex(CODE_PATTERN).default(''),
	tradeName: z.string().trim().min(1).max(200).default(''),
	supplier: z.string().trim().min(1).max(200).default('')
});
export type NewMaterial = z.infer<typeof newMaterialSchema>;

/** A figure as it was typed, and as it was understood. "< 0.1" is a bound, and open. */
export type Figure =
	| { readonly kind: 'none' }
	| { readonly kind: 'value'; readonly value: bigint; readonly open: boolean }
	| { readonly kind: 'fault'; readonly why: DecimalFault; readonly limit: string | null };

/** Reads a percentage of a material with up to eight decimals. */
export function readFigure(text: string): Figure {
	const trimmed = text.trim();
	if (trimmed === '') return { kind: 'none' };
	const open = trimmed.startsWith('<');
	const parsed = parseDecimal(open ? trimmed.slice(1) : trimmed, { decimals: PART_DECIMALS, max: WHOLE_PART });
	return parsed.ok
		? { kind: 'value', value: parsed.value, open }
		: { kind: 'fault', why: parsed.why, limit: parsed.limit };
}

/** What the figures of a row declare; null when one of them cannot be read. "< 0.1" alone is a bound from 0, wherever it was typed. */
export function declaredOf(row: {
	readonly min: string;
	readonly typical: string;
	readonly max: string;
}): Declared | null {
	const [min, typical, max] = [readFigure(row.min), readFigure(row.typical), readFigure(row.max)];
	if (min.kind === 'fault' || typical.kind === 'fault' || max.kind === 'fault') return null;
	const value = (figure: Figure) => (figure.kind === 'value' ? (figure.value as PartShare) : null);
	const boundOnly = typical.kind === 'value' && typical.open && max.kind === 'none';
	return {
		low: value(min),
		typical: boundOnly ? null : value(typical),
		high: boundOnly ? value(typical) : value(max),
		highOpen: boundOnly || (max.kind === 'value' && max.open)
	};
}

export const FIGURE_FIELDS = ['min', 'typical', 'max'] as const;
const LONGEST_FIGURE = 40;
const figure = z.string().max(LONGEST_FIGURE).default('');

export const constituentRowSchema = z
	.object({
		inci: z.string().trim().min(1).max(300),
		cas: z.string().trim().max(20).default(''),
		ec: z.string().trim().max(20).default(''),
		min: figure,
		typical: figure,
		max: figure,
		role: z.enum(ROW_ROLES).default('ingredient'),
		/** Row number of the parent, for a part of another row. */
		parent: z.number().int().min(0).nullable().default(null),
		use: z.enum(USES).default('other'),
		nano: z.boolean().default(false),
		origin: z.enum(ORIGINS).nullable().default(null),
		documentId: z.uuid().nullable().default(null),
		page: z.number().int().positive().max(100_000).nullable().default(null)
	})
	.superRefine((row, ctx) => {
		for (const field of FIGURE_FIELDS) {
			const read = readFigure(row[field]);
			if (read.kind === 'fault') {
				ctx.addIssue({ code: 'custom', path: [field], message: read.why, params: { limit: read.limit } });
			} else if (read.kind === 'value' && read.open && field === 'min') {
				ctx.addIssue({ code: 'custom', path: [field], message: 'openMinimum' });
			}
		}
		for (const [field, fault] of [
			['cas', row.cas ? casFault(row.cas) : null],
			['ec', row.ec ? ecFault(row.ec) : null]
		] as const) {
			if (!fault) continue;
			const right = fault.why === 'checkDigit' ? fault.right : null;
			ctx.addIssue({
				code: 'custom',
				path: [field],
				message: right === null ? 'identifierShape' : 'checkDigit',
				params: { limit: right }
			});
		}
	});
export type ConstituentRowInput = z.infer<typeof constituentRowSchema>;

export const MOST_ROWS = 500;
export const materialDraftSchema = z
	.object({ rev: z.number().int().positive(), rows: z.array(constituentRowSchema).max(MOST_ROWS) })
	.superRefine(({ rows }, ctx) => {
		rows.forEach((row, index) => {
			if (row.role !== 'ofWhich') return;
			const parent = row.parent === null ? undefined : rows[row.parent];
			if (!parent || parent.role === 'ofWhich') {
				ctx.addIssue({ code: 'custom', path: ['rows', index, 'parent'], message: 'parentMissing' });
			}
		});
	});
export type MaterialDraft = z.infer<typeof materialDraftSchema>;

export const releaseMaterialSchema = z.object({
	rev: z.number().int().positive(),
	/** The first batch day for which the version answers; today without one. */
	effectiveFrom: z.iso.date().optional()
});
