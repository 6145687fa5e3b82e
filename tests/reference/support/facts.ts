import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

const FOLDER = path.resolve(import.meta.dirname, '../../../../shared/data');

/** Why the published tables cannot be compared with, or null when they can. */
export const notRun = existsSync(FOLDER)
	? null
	: 'not run: the folder ../shared/data with the published tables is absent';

/** The rows of a published table by column name; RFC 4180 with doubled quotes. */
export function table(name: string): Record<string, string>[] {
	const [header = [], ...rows] = cells(readFileSync(path.join(FOLDER, name), 'utf8'));
	return rows.map((row) => Object.fromEntries(header.map((column, at) => [column, row[at] ?? ''])));
}

function cells(text: string): string[][] {
	const rows: string[][] = [];
	for (const [, quoted, plain, end] of text.matchAll(/(?:"((?:[^"]|"")*)"|([^",\n]*))(,|\r?\n|$)/g)) {
		const last = rows.at(-1);
		const value = quoted?.replaceAll('""', '"') ?? plain ?? '';
		if (last && last.at(-1) === NEXT) last.splice(-1, 1, value);
		else if (end !== '' || value !== '') rows.push([value]);
		if (end === ',') rows.at(-1)?.push(NEXT);
	}
	return rows;
}
/** Stands where a comma announced one more cell. */
const NEXT = '\u0000';
