import { expect, test } from 'vitest';
import { drawBands, forDrawing, lineAt, rowMiddles } from './strata';

const bands = [
	{ key: 'water', share: '75.0' },
	{ key: 'oil', share: '24.0' },
	{ key: 'gum', share: '0.999', below: true },
	{ key: 'trace', share: '0.001', below: true }
];

test('bands are to scale and fill the height', () => {
	const drawn = drawBands(bands, 400);
	expect(drawn.map(({ y }) => Math.round(y))).toEqual([0, 300, 396, 400]);
});
test('a trace is still drawn', () => {
	expect(drawBands(bands, 400).at(-1)?.height).toBe(0.5);
});
test('the 1 % line leaves above the first band below it', () => {
	expect(lineAt(drawBands(bands, 400))).toBeCloseTo(396);
	expect(lineAt(drawBands(bands.slice(0, 2), 400))).toBeNull();
});
test('rows below the line stand one row lower', () => {
	expect(rowMiddles(bands, 26)).toEqual([13, 39, 91, 117]);
});
test('nothing is drawn of nothing', () => {
	expect(drawBands([{ key: 'a', share: '0' }], 400)).toEqual([]);
	expect(forDrawing('q.s.')).toBe(0);
});
