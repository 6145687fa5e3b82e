import { describe, expect, test } from 'vitest';
import { weakest } from './range';
import {
	plus,
	share,
	sum,
	WHOLE_LINE,
	WHOLE_PART,
	WHOLE_PERCENT,
	type LineShare,
	type PartShare,
	type Percent
} from './units';

const line = 5_000_000n as LineShare;
const part = 10n as PartShare;

describe('units', () => {
	test('the whole of a line times the whole of a material is the whole of the formula', () => {
		expect(share(WHOLE_LINE, WHOLE_PART)).toBe(WHOLE_PERCENT);
	});
	test('the smallest part of the smallest line is one unit: nothing is rounded', () => {
		expect(share(1n as LineShare, 1n as PartShare)).toBe(1n);
	});
	test('one unit adds up with itself only: the compiler refuses the rest', () => {
		expect(plus(line, line)).toBe(10_000_000n);
		// @ts-expect-error a share of a line is no share of a material
		expect(plus(line, part)).toBe(5_000_010n);
		// @ts-expect-error a plain integer has no unit
		const unitless: LineShare = 5n;
		// @ts-expect-error a share of a material is no share of a formula
		const percent: Percent = part;
		// @ts-expect-error weight first, part second
		expect(share(part, line)).toBe(50_000_000n);
		expect([unitless, percent, sum([line, line])]).toEqual([5n, 10n, 10_000_000n]);
	});
});

describe('ranges', () => {
	test('a sum trusts its typical as far as its weakest contribution', () => {
		expect(weakest(['declared', 'derived', 'normalised'])).toBe('derived');
		expect(weakest([])).toBe('declared');
	});
});
