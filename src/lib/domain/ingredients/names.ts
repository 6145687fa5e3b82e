import type { CompositionRow } from '../composition/types';
import type { SubstanceIdentity } from './types';

/** Perfume and aromatic compositions carry one word each (Art. 19(1)(g)); the usual English names lead to it. */
const PERFUME_WORDS: ReadonlyMap<string, string> = new Map([
	['parfum', 'Parfum'],
	['fragrance', 'Parfum'],
	['perfume', 'Parfum'],
	['aroma', 'Aroma'],
	['flavor', 'Aroma'],
	['flavour', 'Aroma']
]);
const WATER_WORDS = new Set(['aqua', 'water', 'eau']);

/** The name the EU prints: glossary name, colour index number for a colourant, "(nano)" behind a nanomaterial. */
export function euName(row: Pick<CompositionRow, 'use' | 'nano'>, identity: SubstanceIdentity): string {
	const base = baseName(row, identity);
	return row.nano ? `${base} (nano)` : base;
}

function baseName(row: Pick<CompositionRow, 'use'>, identity: SubstanceIdentity): string {
	if (row.use === 'colourant' && identity.colourIndex !== null) return `CI ${identity.colourIndex}`;
	if (WATER_WORDS.has(identity.key)) return 'Aqua';
	return PERFUME_WORDS.get(identity.key) ?? identity.inci;
}

/** Names in the order of the alphabet, whatever their case; equal but for case, by code point. */
export function compareNames(a: string, b: string): number {
	const [left, right] = [a.toLowerCase(), b.toLowerCase()];
	if (left !== right) return left < right ? -1 : 1;
	return a < b ? -1 : a > b ? 1 : 0;
}

/** Colour index numbers ascending, then other names. */
export function compareColourants(a: string, b: string): number {
	const [left, right] = [colourIndexOf(a), colourIndexOf(b)];
	if (left !== null && right !== null && left !== right) return left < right ? -1 : 1;
	if ((left === null) !== (right === null)) return left === null ? 1 : -1;
	return compareNames(a, b);
}

function colourIndexOf(name: string): bigint | null {
	const match = /^CI (\d{5,6})/.exec(name);
	return match?.[1] ? BigInt(match[1]) : null;
}

/** A colour index number inside a name such as "CI 77891", or null. */
export const colourIndexIn = (inci: string): string | null => /^\s*ci\s*(\d{5,6})\b/i.exec(inci)?.[1] ?? null;
