import { expect, test } from 'vitest';
import { leaderPath } from './leader';

test('it rises to a node that stands higher', () => {
	expect(leaderPath({ fromX: 800, fromY: 400, turnX: 840, toX: 860, toY: 300 })).toBe(
		'M800 400H837q3 0 3 -3V303q0 -3 3 -3H860'
	);
});
test('it falls to a node that stands lower', () => {
	expect(leaderPath({ fromX: 800, fromY: 100, turnX: 840, toX: 860, toY: 300 })).toBe(
		'M800 100H837q3 0 3 3V297q0 3 3 3H860'
	);
});
test('it runs straight to a node at its own height', () => {
	expect(leaderPath({ fromX: 800, fromY: 300, turnX: 840, toX: 860, toY: 302 })).toBe('M800 300H860');
});
