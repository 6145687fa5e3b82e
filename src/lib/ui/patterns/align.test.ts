import { expect, test } from 'vitest';
import { fractionDigits, padding } from './align';

test.each([
	['0.60', 2],
	['3.75–4.25', 2],
	['0,0012', 4],
	['100', 0],
	['q.s.', 0]
])('%s has %d digits behind its sign', (value, digits) => expect(fractionDigits(value)).toBe(digits));

test('points stand under each other', () => {
	expect(padding(['0.990', '0.1', '2'], '.')).toEqual(['', '00', '.000']);
});
test('whole numbers alone need nothing', () => {
	expect(padding(['1', '20'], '.')).toEqual(['', '']);
});
