import { describe, expect, test } from 'vitest';
import { isBefore, isoDate } from './day';
import type { IsoDate } from './units';

describe('isoDate', () => {
	test.each(['2026-07-31', '2024-02-29', '2000-02-29', '2026-12-31'])('takes %s', (text) => {
		expect(isoDate(text)).toBe(text);
	});
	test.each([
		'2026-02-29',
		'1900-02-29',
		'2026-04-31',
		'2026-13-01',
		'2026-00-10',
		'2026-01-00',
		'2026-1-1',
		'31.07.2026'
	])('refuses %s', (text) => expect(isoDate(text)).toBeNull());
	test('days compare by the calendar', () => {
		expect(isBefore('2026-07-31' as IsoDate, '2026-08-01' as IsoDate)).toBe(true);
		expect(isBefore('2026-08-01' as IsoDate, '2026-08-01' as IsoDate)).toBe(false);
	});
});
