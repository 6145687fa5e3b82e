import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { openShelf } from './fonts';
import { splitRuns, uncovered } from './runs';

const shelf = openShelf();
const PROBE = 'ΑαΩωάΐ ЖжЯяЁё ŁłŐőČčĞğẞ ≥ ≤ ≠ ≈ µ μ ² ³ ₂ ℮ – — ’ ‘ “ ” × · • → ← − ± ° € № ½ … ‰';
const textOf = (text: string) =>
	splitRuns(text, 'Noto', shelf)
		.map((run) => run.text)
		.join('');

describe('Runs by glyph coverage', () => {
	test('every character of the probe has a glyph in the family of its run', () => {
		expect(uncovered(PROBE, shelf)).toEqual([]);
		for (const run of splitRuns(PROBE, 'Noto', shelf))
			for (const character of run.text)
				expect(shelf.covers(run.family, character.codePointAt(0) ?? 0), `${character} in ${run.family}`).toBe(true);
	});

	test('every character of the templates and their phrases can be printed', () => {
		for (const folder of ['templates/pdf', 'templates/phrases'])
			for (const file of readdirSync(folder).filter((name) => name.endsWith('.ts')))
				expect(uncovered(readFileSync(join(folder, file), 'utf8'), shelf), `${folder}/${file}`).toEqual([]);
	});

	test('the runs, joined, are the text', () => {
		expect(textOf(PROBE)).toBe(PROBE);
		expect(textOf('a\r\nb')).toBe('a\nb');
	});

	test('what Noto lacks is set in DejaVu, the rest stays in Noto', () => {
		expect(splitRuns('pH ≥ 5', 'Noto', shelf)).toEqual([
			{ text: 'pH ', family: 'Noto' },
			{ text: '≥ ', family: 'DejaVu' },
			{ text: '5', family: 'Noto' }
		]);
	});

	test('a letter stays with its combining mark', () => {
		const runs = splitRuns('e\u0301\u0331', 'Noto', shelf);
		expect(runs).toHaveLength(1);
	});

	test('a character without any glyph is printed by its number and not dropped', () => {
		expect(uncovered('a🌿b', shelf)).toEqual([0x1f33f]);
		expect(textOf('a🌿b')).toBe('a[U+1F33F]b');
		expect(textOf('a\u0007b')).toBe('a[U+0007]b');
	});
});
