import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { decimalOf, formatExact, formatFixed, parseDecimal } from './decimal';

const parse = (text: string) => parseDecimal(text, { decimals: 6, max: 100_000_000n });
const natural = (max: bigint) => fc.bigInt({ min: 0n, max });

describe('parseDecimal', () => {
	test.each([
		['5', 5_000_000n],
		['0,5', 500_000n],
		['0.5', 500_000n],
		[' 12.345678 ', 12_345_678n],
		['1,000', 1_000_000n],
		['0.1000000000', 100_000n],
		['100', 100_000_000n],
		['0', 0n]
	])('reads %s', (text, value) => expect(parse(text)).toEqual({ ok: true, value }));

	test.each([
		['', 'empty', null],
		['   ', 'empty', null],
		['1.000,5', 'grouping', null],
		['1,000.5', 'grouping', null],
		['1 000', 'grouping', null],
		['1\u202f000,5', 'grouping', null],
		["1'000", 'grouping', null],
		['-1', 'negative', '0'],
		['−0.5', 'negative', '0'],
		['1e3', 'notANumber', null],
		['+5', 'notANumber', null],
		['five', 'notANumber', null],
		['5 %', 'notANumber', null],
		['.', 'notANumber', null],
		['0.1234567', 'tooManyDecimals', '6'],
		['100.000001', 'aboveMost', '100'],
		['1'.repeat(41), 'tooLong', '40']
	])('refuses %j: %s', (text, why, limit) => expect(parse(text)).toEqual({ ok: false, why, limit }));

	test('what is written exactly is read back, with either sign of decimals', () => {
		fc.assert(
			fc.property(natural(10n ** 20n), fc.integer({ min: 0, max: 16 }), (value, decimals) => {
				const text = formatExact(value, decimals);
				expect(parseDecimal(text, { decimals })).toEqual({ ok: true, value });
				expect(parseDecimal(text.replace('.', ','), { decimals })).toEqual({ ok: true, value });
			})
		);
	});
	test('no text at all makes it throw', () => {
		fc.assert(fc.property(fc.string(), (text) => void parse(text)));
	});
	test('a malformed decimal of our own is a bug', () => {
		expect(() => decimalOf('1 000', 6)).toThrow(RangeError);
	});
});

describe('formatFixed', () => {
	test.each([
		[1_000_001n, 'up', '1.01'],
		[1_000_001n, 'down', '1.00'],
		[1_005_000n, 'nearest', '1.01'],
		[1_004_999n, 'nearest', '1.00'],
		[1_000_000n, 'up', '1.00']
	] as const)('%s in millionths, %s', (value, direction, text) => {
		expect(formatFixed(value, 6, 2, direction)).toBe(text);
	});
	test('more places than the scale holds are filled with noughts', () => {
		expect(formatFixed(15n, 1, 3, 'up')).toBe('1.500');
		expect(formatFixed(15n, 0, 0, 'down')).toBe('15');
	});
	test('up never shows less and down never more; a value above a limit of few decimals never prints as the limit', () => {
		fc.assert(
			fc.property(natural(10n ** 18n), natural(10n ** 6n), (value, limit) => {
				const shown = (direction: 'up' | 'down') => decimalOf(formatFixed(value, 16, 4, direction), 16);
				expect(shown('up') >= value && shown('down') <= value).toBe(true);
				const scaled = limit * 10n ** 12n;
				if (value > scaled) expect(shown('up')).toBeGreaterThan(scaled);
				if (value < scaled) expect(shown('down')).toBeLessThan(scaled);
			})
		);
	});
});
