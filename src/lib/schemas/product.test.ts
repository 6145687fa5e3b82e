import { describe, expect, test } from 'vitest';
import { gtinCheckDigit, packSchema, slugOf } from './product';

describe('GTIN check digit (GS1 General Specifications, worked example 629104150021 gives 3)', () => {
	test('the published example', () => expect(gtinCheckDigit('629104150021')).toBe(3));
	test('a wrong last digit is refused with the right one', () => {
		const parsed = packSchema.safeParse({ name: 'Jar', size: '50', unit: 'ml', gtin: '6291041500214' });
		expect(parsed.error?.issues[0]?.message).toBe('gtin-check-digit:3');
	});
	test('none is allowed', () =>
		expect(packSchema.safeParse({ name: 'Jar', size: '50,5', unit: 'ml', gtin: '' }).success).toBe(true));
});

test('an address part loses accents and punctuation', () => {
	expect(slugOf('Crème d’été № 5')).toBe('creme-d-ete-no-5');
});
