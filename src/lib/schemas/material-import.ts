import { z } from 'zod';
import type { ROW_ROLES, USES } from './material';
import { CODE_PATTERN, ORIGINS } from './material';

/** The columns of the sheet, in the template's order; one row is one constituent. */
export const IMPORT_COLUMNS = [
	'material_code',
	'trade_name',
	'supplier',
	'constituent',
	'cas',
	'ec',
	'min',
	'typical',
	'max',
	'role',
	'part_of',
	'function',
	'nano',
	'origin',
	'document',
	'page'
] as const;
export type ImportColumn = (typeof IMPORT_COLUMNS)[number];
/** Without these a sheet cannot be read at all. */
export const REQUIRED_COLUMNS: readonly ImportColumn[] = ['material_code', 'constituent'];

export type ImportCells = Readonly<Partial<Record<ImportColumn, string>>>;

/** The words a cell may hold; what is not named here is refused with the list. An empty cell is the first of each. */
export const ROLE_WORDS: Readonly<Record<string, (typeof ROW_ROLES)[number]>> = {
	ingredient: 'ingredient',
	'carry-over': 'carryOver',
	impurity: 'impurity',
	'processing aid': 'processingAid',
	'of which': 'ofWhich'
};
export const FUNCTION_WORDS: Readonly<Record<string, (typeof USES)[number]>> = {
	none: 'other',
	preservative: 'preservative',
	'uv filter': 'uvFilter',
	colourant: 'colourant',
	'hair dye': 'hairDye'
};
export const YES_WORDS: Readonly<Record<string, boolean>> = { no: false, yes: true };
export const ORIGIN_WORDS: Readonly<Record<string, (typeof ORIGINS)[number]>> = Object.fromEntries(
	ORIGINS.map((origin) => [origin, origin])
);

/** What is wrong with a cell, or with the material as a whole (`field` 'material'). */
export interface ImportFault {
	readonly field: ImportColumn | 'material';
	readonly why: string;
	readonly value: string;
	readonly limit: string | null;
}

/** "Material code", "material-code" and "MATERIAL_CODE" are one name. */
export function columnNamed(head: string): ImportColumn | null {
	const name = head
		.trim()
		.toLowerCase()
		.replace(/[\s_-]+/g, '_');
	return IMPORT_COLUMNS.find((column) => column === name) ?? null;
}

export const LONGEST_IMPORT_CELL = 2_000;
const cell = z.string().max(LONGEST_IMPORT_CELL);

export const mendSchema = z.object({
	number: z.coerce.number().int().positive(),
	cells: z.partialRecord(z.enum(IMPORT_COLUMNS), cell)
});
export type Mend = z.infer<typeof mendSchema>;

export const beginImportSchema = z.object({ documentId: z.uuid() });

export const commitImportSchema = z.object({
	release: z.enum(['drafts', 'release']).default('drafts'),
	effectiveFrom: z
		.union([z.iso.date(), z.literal('')])
		.default('')
		.transform((day) => day || null)
});
export type CommitImport = z.infer<typeof commitImportSchema>;

export const isMaterialCode = (text: string) => CODE_PATTERN.test(text);

/** Which rows of an import are shown. */
export const importFilterSchema = z.object({
	show: z.enum(['faulty', 'all']).nullable().catch(null),
	page: z.coerce.number().int().min(1).catch(1)
});
