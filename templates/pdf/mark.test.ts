import { describe, expect, test } from 'vitest';
import { markBackground, markOf } from './mark';
import { letterOf } from './words';
import { chaptersOf, openChapters } from './plan';
import { PRODUCT_FILE } from './testing/nightfold';
import { PRINTED_SECTIONS, type PrintedCopyState } from './types';

describe('Mark of a copy', () => {
	test.each<{ state: PrintedCopyState; fresh: string | null; old: string }>([
		{ state: 'draft', fresh: 'draft', old: 'draft' },
		{ state: 'inReview', fresh: 'inReview', old: 'inReview' },
		{ state: 'sentBack', fresh: 'sentBack', old: 'sentBack' },
		{ state: 'approvedByLaboratory', fresh: 'awaitsClient', old: 'awaitsClient' },
		{ state: 'approvedByClient', fresh: null, old: 'outOfDate' },
		{ state: 'inUse', fresh: null, old: 'outOfDate' },
		{ state: 'superseded', fresh: 'superseded', old: 'superseded' }
	])('$state: $fresh while it stands, $old when out of date', ({ state, fresh, old }) => {
		expect(markOf({ state, outOfDate: null })).toBe(fresh);
		expect(markOf({ state, outOfDate: 'Formula 8' })).toBe(old);
	});

	test('it is drawn once behind the words and three times at the side', () => {
		const drawn = markBackground('Draft', { outline: () => ({ path: 'M0 0L9 9Z', width: 2000 }) })();
		expect(JSON.stringify(drawn).split('M0 0L9 9Z').length - 1).toBe(4);
	});
});

describe('Plan of the file', () => {
	test('a section that the data leaves out stands as not begun', () => {
		const chapters = chaptersOf({ ...PRODUCT_FILE, sections: [] });
		const sections = chapters.flatMap((chapter) => (chapter.kind === 'single' ? [chapter.section] : chapter.headings));
		expect(sections.map((section) => section.section)).toEqual(PRINTED_SECTIONS);
		expect(sections.every((section) => section.readiness === 'notBegun')).toBe(true);
		expect(openChapters(chapters)).toEqual(['1', '2', '3', '4', '5', '6', '7']);
	});

	test.each([
		[0, 'a'],
		[25, 'z'],
		[26, 'aa'],
		[51, 'az'],
		[52, 'ba'],
		[702, 'aaa']
	])('source %i is lettered %s', (index, letter) => expect(letterOf(index)).toBe(letter));
});
