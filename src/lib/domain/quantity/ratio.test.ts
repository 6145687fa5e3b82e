import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { compareRatios, formatRatio, ratio } from './ratio';

const whole = fc.bigInt({ min: 0n, max: 10n ** 12n });
const positive = fc.bigInt({ min: 1n, max: 10n ** 12n });

describe('ratio', () => {
	test('is reduced and has a positive denominator', () => {
		expect(ratio(6n, -8n)).toEqual({ num: -3n, den: 4n });
		expect(ratio(0n, 5n)).toEqual({ num: 0n, den: 1n });
	});
	test('needs a denominator', () => expect(() => ratio(1n, 0n)).toThrow(RangeError));
	test('factors do not matter to a comparison', () => {
		fc.assert(
			fc.property(whole, positive, positive, (num, den, factor) => {
				expect(compareRatios(ratio(num, den), { num: num * factor, den: den * factor })).toBe(0);
				expect(compareRatios(ratio(num, den), ratio(num + 1n, den))).toBe(-1);
			})
		);
	});
});

describe('formatRatio', () => {
	test('prints exactly what ends', () => expect(formatRatio(ratio(5_625_000_000n, 1n), 8, 0, 'nearest')).toBe('56.25'));
	test.each([
		['up', '0.34'],
		['down', '0.33'],
		['nearest', '0.33']
	] as const)('a third of one, %s', (direction, text) => {
		expect(formatRatio(ratio(100n, 3n), 2, 2, direction)).toBe(text);
	});
	test('rounds up on a remainder however small', () => {
		expect(formatRatio(ratio(10n ** 30n + 1n, 10n ** 30n), 0, 2, 'up')).toBe('1.01');
		expect(formatRatio(ratio(10n ** 30n + 1n, 10n ** 30n), 0, 2, 'nearest')).toBe('1.00');
	});
});
