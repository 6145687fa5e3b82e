import { describe, expect, test } from 'vitest';
import { copyElements, copyFaults } from './elements';
import { canonicalCopy, changedElements, elementsJson, plainCopy } from './forms';
import type { LabelContent, ListStanding } from './types';
import { LABEL_WORDS } from './words';

const WORDS = LABEL_WORDS.en;
const full: LabelContent = {
	form: 1,
	brand: 'Nightfold',
	name: 'Nightfold Cream',
	function: 'Night face cream',
	content: { size: '50', unit: 'ml', eMark: true },
	directions: '',
	precautions: '',
	ingredients: 'Aqua, Glycerin',
	durability: { kind: 'periodAfterOpening', months: 12 },
	batch: 'printed at filling',
	responsible: { name: 'Pell & Fennick Ltd', address: '7 Example Quay, Dublin, Ireland' },
	imported: false,
	origin: ''
};
const certain: ListStanding = { kind: 'list', text: 'Aqua, Glycerin', weak: [], questions: [] };
const missing = (change: Partial<LabelContent>) =>
	copyElements({ ...full, ...change }, WORDS)
		.filter((row) => row.missing)
		.map(({ element }) => element);
const faults = (change: Partial<LabelContent>, list: ListStanding = certain) =>
	copyFaults({ ...full, ...change }, list, WORDS).faults;
const sized = (size: string, eMark = false) => ({ content: { size, unit: 'ml' as const, eMark } });

describe('what is missing', () => {
	test.each<[string, Partial<LabelContent>, string[]]>([
		['nothing of a full copy', {}, []],
		['brand and name', { brand: ' ', name: '' }, ['brand', 'name']],
		['function', { function: '' }, ['function']],
		['durability that nobody chose', { durability: null }, ['durability']],
		[
			'none where durability after opening is not relevant',
			{ durability: { kind: 'notNeeded', reason: 'aerosol' } },
			[]
		],
		[
			'an address without a name is no responsible person',
			{ responsible: { name: '', address: 'x' } },
			['responsiblePerson']
		],
		['origin of an imported product', { imported: true }, ['origin']],
		['batch', { batch: '' }, ['batch']],
		['the content from 5 ml on', sized('x'), ['nominalContent']],
		['directions and precautions are not asked for by themselves', { directions: '', precautions: '' }, []]
	])('%s', (_why, change, expected) => expect(missing(change)).toEqual(expected));

	test('a content under 5 ml is not required', () => {
		const required = (size: string) =>
			copyElements({ ...full, ...sized(size) }, WORDS).find(({ element }) => element === 'nominalContent')?.required;
		expect([required('4.999'), required('5')]).toEqual([false, true]);
	});
});

describe('what refuses a copy', () => {
	test('nothing refuses a full copy with a certain list', () => {
		expect(copyFaults(full, certain, WORDS)).toEqual({ faults: [], questions: [] });
	});
	test('a draft without a list of its own is judged by the list that can be made', () => {
		expect(faults({ ingredients: '' })).toEqual([]);
	});
	test('an order that depends on a range', () => {
		const weak = [{ before: 'Glycerin', after: 'Betaine' }];
		expect(faults({}, { ...certain, weak })).toEqual([
			{ kind: 'orderDependsOnRange', before: 'Glycerin', after: 'Betaine' }
		]);
	});
	test.each(['nothingReleased', 'contradictory', 'beingRechecked'] as const)('%s is told once', (kind) =>
		expect(faults({ ingredients: '' }, { kind })).toEqual([{ kind }])
	);
	test.each([
		['4.999', true],
		['5', false],
		['10000', false],
		['10000.001', true]
	])('an e-mark on %s ml', (size, refused) => expect(faults(sized(size, true)).length > 0).toBe(refused));
	test('a threshold question asks and does not refuse', () => {
		const question = { name: 'Linalool', low: '0.0005', high: '0.002', limit: '0.001' };
		expect(copyFaults(full, { ...certain, questions: [question] }, WORDS)).toEqual({
			faults: [],
			questions: [{ kind: 'threshold', ...question }]
		});
	});
});

describe('forms', () => {
	// Approvals rest on the hash of this text: it may never change while `form` stays 1.
	test('golden canonical text', () =>
		expect(canonicalCopy(full)).toBe(
			'{"batch":"printed at filling","brand":"Nightfold","content":{"eMark":true,"size":"50","unit":"ml"},"directions":"","durability":{"kind":"periodAfterOpening","months":12},"form":1,"function":"Night face cream","imported":false,"ingredients":"Aqua, Glycerin","name":"Nightfold Cream","origin":"","precautions":"","responsible":{"address":"7 Example Quay, Dublin, Ireland","name":"Pell & Fennick Ltd"}}'
		));
	test('a mark stands first and last in the plain text', () => {
		const text = plainCopy(full, WORDS, { lines: ['Copy 3'], mark: 'Draft, not for print' });
		expect(text.startsWith('*** Draft, not for print ***\n')).toBe(true);
		expect(text.endsWith('*** Draft, not for print ***\n')).toBe(true);
		expect(text).toContain('Ingredients: Aqua, Glycerin');
		expect(text).toContain('50 ml ℮');
	});
	test('without a mark the text has none', () =>
		expect(plainCopy(full, WORDS, { lines: ['Copy 3'], mark: null })).not.toContain('***'));
	test('absent elements are left out', () =>
		expect(elementsJson(full, WORDS).map(({ element }) => element)).not.toContain('directions'));
	test('changes name the element with both texts', () => {
		const after: LabelContent = {
			...full,
			ingredients: 'Aqua, Betaine',
			durability: { kind: 'periodAfterOpening', months: 6 }
		};
		expect(changedElements(full, after, WORDS)).toEqual([
			{ element: 'ingredients', before: 'Aqua, Glycerin', after: 'Aqua, Betaine' },
			{ element: 'durability', before: 'Open jar: 12 M', after: 'Open jar: 6 M' }
		]);
		expect(changedElements(full, full, WORDS)).toEqual([]);
	});
});
