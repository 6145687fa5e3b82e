import { describe, expect, test } from 'vitest';
import type { IsoDate } from '../quantity/units';
import { readSections, type FileFacts } from './readiness';
import { NEEDS, SECTIONS } from './sections';

const day = '2026-12-01' as IsoDate;
const document = (id: string, kind: string, expires: string | null = null) => ({
	id,
	kind,
	title: `Document ${id}`,
	expires: expires as IsoDate | null
});
const facts = (more: Partial<FileFacts> = {}): FileFacts => ({
	day,
	formulaVersion: 'v7',
	beingRechecked: false,
	materials: [{ code: 'M', name: 'Material', documents: [document('c', 'composition')] }],
	filed: [],
	copy: 'none',
	claims: [],
	decisions: new Map(),
	...more
});
const sectionOf = (section: string, given: FileFacts) => readSections(given).find((each) => each.section === section);

test('every section needs something, and every need belongs to a section', () => {
	expect(SECTIONS.filter((section) => !NEEDS.some((need) => need.section === section))).toEqual([]);
	expect(new Set(NEEDS.map(({ key }) => key)).size).toBe(NEEDS.length);
});

describe('a report counts for the formula it was made on', () => {
	const filed = [
		{ need: 'a2.stability', document: document('s', 'stabilityReport'), formulaVersion: 'v7' },
		{ need: 'a2.specification', document: document('p', 'specification'), formulaVersion: null }
	];
	test('with both items the heading is ready', () =>
		expect(sectionOf('a2', facts({ filed }))?.readiness).toBe('ready'));
	test('another formula version makes it out of date, and says so', () => {
		const reading = sectionOf('a2', facts({ filed, formulaVersion: 'v8' }));
		expect(reading?.readiness).toBe('outOfDate');
		expect(reading?.needs[0]?.why).toEqual({ code: 'otherFormula', names: ['Document s'] });
	});
	test('with one of two items it is incomplete, with none not begun', () => {
		expect(sectionOf('a2', facts({ filed: filed.slice(0, 1) }))?.readiness).toBe('incomplete');
		expect(sectionOf('a2', facts())?.readiness).toBe('notBegun');
	});
});

describe('dates', () => {
	const statement = (expires: string) =>
		facts({ materials: [{ code: 'M', name: 'Material', documents: [document('c', 'composition', expires)] }] });
	test('a document counts on its last day', () =>
		expect(sectionOf('a1', statement('2026-12-01'))?.readiness).toBe('ready'));
	test('and no longer on the day after', () => {
		expect(sectionOf('a1', statement('2026-11-30'))?.needs[1]).toMatchObject({
			state: 'outOfDate',
			why: { code: 'materialsExpired', names: ['Material'] }
		});
	});
});

test('a need that is not applicable stands with its reason and does not hold the section back', () => {
	const decisions = new Map([['a9.effects', { applicable: false, reason: 'Not yet placed on the market.' }]]);
	expect(sectionOf('a9', facts({ decisions }))).toMatchObject({
		readiness: 'ready',
		needs: [{ state: 'notApplicable', why: { names: ['Not yet placed on the market.'] } }]
	});
});
test('a material without the document is named', () => {
	expect(sectionOf('a4', facts())?.needs[0]?.why).toEqual({ code: 'materialsMissing', names: ['Material'] });
});
test('being re-checked comes before everything', () => {
	expect(readSections(facts({ beingRechecked: true })).every(({ readiness }) => readiness === 'beingRechecked')).toBe(
		true
	);
});
test('a claim without evidence is missing, an old one out of date', () => {
	expect(sectionOf('effect', facts({ claims: [{ wording: 'A', state: 'notYet' }] }))?.readiness).toBe('notBegun');
	expect(sectionOf('effect', facts({ claims: [{ wording: 'A', state: 'outOfDate' }] }))?.readiness).toBe('outOfDate');
	expect(sectionOf('effect', facts({ claims: [{ wording: 'A', state: 'supported' }] }))?.readiness).toBe('ready');
});
