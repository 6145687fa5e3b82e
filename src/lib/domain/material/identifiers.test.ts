import { describe, expect, test } from 'vitest';
import { casFault, ecFault } from './identifiers';
import { substanceKey } from './substance-key';

describe('casFault', () => {
	test.each([
		['7732-18-5', 'water'],
		['56-81-5', 'glycerol'],
		['78-70-6', 'linalool'],
		['122-99-6', '2-phenoxyethanol'],
		['13463-67-7', 'titanium dioxide']
	])('%s (%s) is right', (number) => expect(casFault(number)).toBeNull());
	test('a wrong check digit comes with the right one', () => {
		expect(casFault('7732-18-4')).toEqual({ why: 'checkDigit', right: '5' });
	});
	test.each(['7732185', '1-18-5', '7732-18-', '12345678-18-5', ' 56-81-5', '56–81–5'])(
		'%j has no such shape',
		(text) => {
			expect(casFault(text)).toEqual({ why: 'shape' });
		}
	);
});

describe('ecFault', () => {
	test.each([
		['231-791-2', 'water'],
		['200-289-5', 'glycerol'],
		['201-134-4', 'linalool'],
		['236-675-5', 'titanium dioxide']
	])('%s (%s) is right', (number) => expect(ecFault(number)).toBeNull());
	test('a wrong check digit comes with the right one', () => {
		expect(ecFault('231-791-3')).toEqual({ why: 'checkDigit', right: '2' });
	});
	test('a number whose digits give ten has no right one', () => {
		expect(ecFault('200-005-0')).toEqual({ why: 'checkDigit', right: '' });
	});
	test('another shape', () => expect(ecFault('2317912')).toEqual({ why: 'shape' }));
});

describe('substanceKey', () => {
	test.each([
		['Caprylic/Capric Triglyceride', 'CAPRYLIC / CAPRIC  TRIGLYCERIDE'],
		['Rosa Canina Fruit Oil', 'rosa canina fruit-oil'],
		['Carthamus Tinctorius Oléosomes', 'Carthamus tinctorius oleosomes'],
		['PEG-40 Hydrogenated Castor Oil', 'PEG‑40 hydrogenated castor oil']
	])('%s and %s meet', (a, b) => expect(substanceKey(a)).toBe(substanceKey(b)));
	test.each([
		['PEG-4', 'PEG-40'],
		['Alpha-Pinene', 'Beta-Pinene'],
		['2-Octynoate', '2 1-Octynoate']
	])('%s and %s do not', (a, b) => expect(substanceKey(a)).not.toBe(substanceKey(b)));
});
