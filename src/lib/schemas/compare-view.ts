import { z } from 'zod';

/** A line or ingredient in two versions; null where a version has none. */
export interface ComparedRow {
	readonly key: string;
	readonly name: string;
	readonly a: string | null;
	readonly b: string | null;
}
export interface CompareView {
	readonly formula: { readonly code: string; readonly name: string };
	readonly versions: readonly { readonly number: number; readonly draft: boolean }[];
	readonly a: number;
	readonly b: number;
	readonly lines: readonly ComparedRow[];
	readonly ingredients: readonly ComparedRow[];
	readonly lists: { readonly a: string; readonly b: string };
}

const version = z.coerce.number().int().positive().nullable().catch(null);
export const compareQuerySchema = z.object({ a: version, b: version });
