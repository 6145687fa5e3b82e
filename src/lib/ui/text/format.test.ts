import { describe, expect, test } from 'vitest';
import { formatDate, formatDateTime, formatDecimal, formatRange, formatSize, plural } from './format';

describe('dates', () => {
	test.each([
		{ why: 'a day in data', iso: '2026-12-01', read: '1 Dec 2026' },
		{ why: 'the last second of a day stays on that day', iso: '2026-12-31T23:59:59.999Z', read: '31 Dec 2026' },
		{ why: 'the first second of a day stays on that day', iso: '2026-01-01T00:00:00+14:00', read: '1 Jan 2026' },
		{ why: 'what is no date is given back', iso: 'next week', read: 'next week' },
		{ why: 'a month that does not exist is given back', iso: '2026-13-01', read: '2026-13-01' }
	])('$why', ({ iso, read }) => expect(formatDate(iso)).toBe(read));

	test('a time is read as written', () => expect(formatDateTime('2026-12-01T14:02:59Z')).toBe('1 Dec 2026, 14:02'));
});

describe('decimals', () => {
	test.each([
		{ why: 'every digit is kept', value: '66.03900', sign: '.' as const, read: '66.03900' },
		{ why: 'the comma of the person', value: '0.0012', sign: ',' as const, read: '0,0012' },
		{ why: 'a whole number has no sign', value: '100', sign: ',' as const, read: '100' },
		{ why: 'minus is a minus, not a hyphen', value: '-0.50', sign: '.' as const, read: '−0.50' },
		{
			why: 'more digits than a float holds',
			value: '12345678901234567890.123456789',
			sign: '.' as const,
			read: '12345678901234567890.123456789'
		},
		{ why: 'text is given back', value: 'q.s.', sign: ',' as const, read: 'q.s.' }
	])('$why', ({ value, sign, read }) => expect(formatDecimal(value, sign)).toBe(read));

	test('thousands are set off by the other sign', () => {
		expect(formatDecimal('18450.0', '.', true)).toBe('18,450.0');
		expect(formatDecimal('18450.0', ',', true)).toBe('18.450,0');
	});

	test('a range of one value is one figure', () => {
		expect(formatRange('1.000', '1.000', '.')).toBe('1.000');
		expect(formatRange('4.350', '4.850', ',')).toBe('4,350–4,850');
	});
});

describe('sizes', () => {
	test.each([
		[0, '0 bytes'],
		[1, '1 byte'],
		[1023, '1,023 bytes'],
		[1024, '1 KiB'],
		[1536, '1.5 KiB'],
		[250 * 1024 * 1024, '250 MiB'],
		[250 * 1024 * 1024 - 1, '250 MiB'],
		[250 * 1024 * 1024 + 1, '250.1 MiB']
	])('%d bytes', (bytes, read) => expect(formatSize(bytes, '.')).toBe(read));
});

test('one is single, none and many are not', () => {
	expect(plural(1, 'name', 'names')).toBe('1 name');
	expect(plural(0, 'name', 'names')).toBe('0 names');
	expect(plural(1204, 'name', 'names')).toBe('1,204 names');
});
