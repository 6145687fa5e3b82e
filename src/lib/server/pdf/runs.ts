import type { Family, FontShelf } from './fonts';

export interface Run {
	readonly text: string;
	readonly family: Family;
}

type Coverage = Pick<FontShelf, 'covers'>;

const graphemes = new Intl.Segmenter('en', { granularity: 'grapheme' });

/** Characters that steer the layout and have no glyph of their own. */
const isLayout = (codePoint: number) => codePoint === 0x0a || codePoint === 0x09;

const ORDER: Readonly<Record<Family, readonly Family[]>> = {
	Noto: ['Noto', 'DejaVu'],
	DejaVu: ['DejaVu', 'Noto'],
	Mono: ['Mono', 'DejaVu', 'Noto']
};

const codePointsOf = (text: string) => Array.from(text, (character) => character.codePointAt(0) ?? 0);

function familyFor(cluster: string, base: Family, shelf: Coverage): Family | null {
	const points = codePointsOf(cluster).filter((point) => !isLayout(point));
	return ORDER[base].find((family) => points.every((point) => shelf.covers(family, point))) ?? null;
}

/**
 * A character without a glyph in any face would print as an empty box and vanish from the text layer, which can turn
 * "≥ 5" into "5". It is printed by its number instead, so that nothing is lost without a trace.
 */
const spelledOut = (cluster: string) =>
	codePointsOf(cluster)
		.map((point) => `[U+${point.toString(16).toUpperCase().padStart(4, '0')}]`)
		.join('');

/**
 * Splits a text into stretches that one family can set, the base family first. Letters are kept together with their
 * combining marks. The texts of the runs, joined, are the given text, but for characters that no face has.
 */
export function splitRuns(text: string, base: Family, shelf: Coverage): readonly Run[] {
	const runs: { text: string; family: Family }[] = [];
	for (const { segment } of graphemes.segment(text.replace(/\r\n?/g, '\n'))) {
		const found = familyFor(segment, base, shelf);
		const family = found ?? base;
		const part = found ? segment : spelledOut(segment);
		const last = runs.at(-1);
		if (last && (last.family === family || segment.trim() === '')) last.text += part;
		else runs.push({ text: part, family });
	}
	return runs;
}

/** The code points of a text that neither the base family nor its stand-in can print; empty when all can be. */
export function uncovered(text: string, shelf: Coverage, base: Family = 'Noto'): readonly number[] {
	const missing = codePointsOf(text).filter(
		(point) => !isLayout(point) && !ORDER[base].some((family) => shelf.covers(family, point))
	);
	return [...new Set(missing)];
}
