import { expect, test } from 'vitest';
import { declaredEnds, declaredWords, judgeRows, roomOfRows, type DraftRow } from './rows';

const row = (key: number, more: Partial<DraftRow>): DraftRow => ({
	key,
	inci: `Name ${key}`,
	cas: '',
	ec: '',
	min: '',
	typical: '',
	max: '',
	role: 'ingredient',
	parent: null,
	use: 'other',
	nano: false,
	origin: null,
	documentId: '',
	page: '',
	...more
});

test('the sum narrows what is typed, with a comma or a point', () => {
	const { narrowed, faults } = judgeRows([row(1, { min: '48', max: '52,5' }), row(2, { min: '0', max: '50' })]);
	expect(faults).toEqual([]);
	expect(narrowed.get(1)).toMatchObject({ low: '50', high: '52.5' });
	expect(narrowed.get(2)).toMatchObject({ low: '47.5', high: '50' });
});
test('a contradiction says by how much', () => {
	const { faults } = judgeRows([row(1, { min: '60', max: '70' }), row(2, { min: '45', max: '50' })]);
	expect(faults).toMatchObject([{ fault: { kind: 'minimaAbove100' }, by: '5' }]);
});
test('"< 0.1" is a bound from 0', () => {
	const { narrowed } = judgeRows([row(1, {}), row(2, { typical: '< 0.1', role: 'impurity' })]);
	expect(narrowed.get(2)).toMatchObject({ low: '0', high: '0.1' });
});
test('nothing is computed from a figure that cannot be read', () => {
	expect(judgeRows([row(1, { typical: 'much' })]).readable).toBe(false);
});
test('declared figures in words', () => {
	const words = {
		between: (a: string, b: string) => `${a} to ${b}`,
		below: (a: string) => `below ${a}`,
		balance: 'balance'
	};
	expect(declaredWords(row(1, { min: '48', max: '52' }), words)).toBe('48 to 52');
	expect(declaredWords(row(1, { typical: '< 0.1' }), words)).toBe('below 0.1');
	expect(declaredWords(row(1, {}), words)).toBe('balance');
});
test('the room that the others leave, and what is declared, stand on one scale', () => {
	const rows = [row(1, { min: '65', max: '80' }), row(2, { min: '18', max: '22' }), row(3, { min: '5', max: '20' })];
	expect(roomOfRows(rows).get(1)).toEqual({ low: '58', high: '77' });
	expect(declaredEnds(rows[0]!)).toEqual({ low: '65', high: '80' });
	expect(declaredEnds(row(4, { typical: '< 0.1' }))).toEqual({ low: '0', high: '0.1' });
	expect(declaredEnds(row(5, {}))).toEqual({ low: '0', high: '100' });
});
