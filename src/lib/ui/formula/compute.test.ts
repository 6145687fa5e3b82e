import { describe, expect, test } from 'vitest';
import type { LineView } from '$lib/schemas/grid-view';
import { balanceOf, mergeLines, readPaste } from './compute';

const line = (id: string, percent: string, more: Partial<LineView> = {}): LineView => ({
	id,
	phase: 'A',
	kind: 'material',
	code: id.toUpperCase(),
	name: id,
	percent,
	min: '',
	max: '',
	qs: false,
	pinned: null,
	pinReason: '',
	...more
});

describe('balance', () => {
	test('the q.s. line takes what is left of 100, exactly', () => {
		const balance = balanceOf([line('a', '', { qs: true }), line('b', '5,25'), line('c', '0.000001')]);
		expect(balance.qs).toBe(94_749_999n);
		expect(balance.total).toBe(100_000_000n);
	});
	test('an amount that cannot be read is not counted as zero silently', () => {
		expect(balanceOf([line('a', 'much')]).readable).toBe(false);
	});
});

describe('paste from a spreadsheet', () => {
	const row = (names: readonly string[], percent: string, qs = false) => ({ names, percent, qs });
	test('a column of amounts, comma or point', () => {
		expect(readPaste('1,5\r\n2.25\n')).toEqual([row([], '1,5'), row([], '2.25')]);
	});
	test('material and amount, in either order', () => {
		expect(readPaste('GLY-995\t5.00 %\nOL-CT60\t8')).toEqual([row(['GLY-995'], '5.00'), row(['OL-CT60'], '8')]);
		expect(readPaste('5\tGLY-995')).toEqual([row(['GLY-995'], '5')]);
	});
	test('a number, a phase and grams stand beside: the column that sums to 100 is meant', () => {
		expect(readPaste('1\tA\tProcess water\t70\t700\n2\tB\tBrackmul GS\t30\t300')).toEqual([
			row(['A', 'Process water'], '70'),
			row(['B', 'Brackmul GS'], '30')
		]);
	});
	test('or the column whose head says %', () => {
		expect(readPaste('Material\tg\t% w/w\nUrea\t30\t3')).toEqual([row(['Urea'], '3')]);
	});
	test('q.s. is understood, and what cannot be read is kept as it was written', () => {
		expect(readPaste('Process water\tq.s.\nUrea\t1.234,5')).toEqual([
			row(['Process water'], '', true),
			expect.objectContaining({ percent: '1.234,5' })
		]);
	});
});

describe('two people edit one draft', () => {
	const base = [line('a', '1'), line('b', '2')];
	test('edits of different lines are joined', () => {
		const { lines, conflicts } = mergeLines(base, [line('a', '9'), line('b', '2')], [line('a', '1'), line('b', '7')]);
		expect(lines.map(({ percent }) => percent)).toEqual(['9', '7']);
		expect(conflicts).toEqual([]);
	});
	test('one line changed by both shows both values; mine stands until chosen', () => {
		const { lines, conflicts } = mergeLines(base, [line('a', '9'), line('b', '2')], [line('a', '8'), line('b', '2')]);
		expect(lines[0]?.percent).toBe('9');
		expect(conflicts).toMatchObject([{ id: 'a', mine: { percent: '9' }, theirs: { percent: '8' } }]);
	});
	test('a line that somebody added is kept', () => {
		const { lines } = mergeLines(base, [...base, line('c', '3')], [...base, line('d', '4')]);
		expect(lines.map(({ id }) => id).sort()).toEqual(['a', 'b', 'c', 'd']);
	});
});
