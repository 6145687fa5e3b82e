import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Id, PartShare } from '../quantity/units';
import { resolveMaterial } from './resolve';
import { roomOf } from './room';
import type { Constituent } from './types';

const PERCENT = 100_000_000n;
const constituent = (id: string, low: number, high: number): Constituent => ({
	id: id as Id<'constituent'>,
	substance: id as Id<'substance'>,
	declared: {
		low: (BigInt(low) * PERCENT) as PartShare,
		typical: null,
		high: (BigInt(high) * PERCENT) as PartShare,
		highOpen: false
	},
	nano: false,
	use: 'other',
	source: null,
	place: 'inSum',
	role: 'ingredient'
});
const version = (constituents: readonly Constituent[]) => ({
	id: 'v' as Id<'materialVersion'>,
	material: 'm' as Id<'material'>,
	number: 1,
	effectiveFrom: null,
	contentHash: null,
	constituents
});

describe('the room that the others leave', () => {
	test('65-80, 18-22 and 5-20: the first has 58 to 77, whatever is said of it', () => {
		// 100 − 22 − 20 = 58; 100 − 18 − 5 = 77.
		const room = roomOf([constituent('a', 65, 80), constituent('b', 18, 22), constituent('c', 5, 20)]);
		expect(room.get('a' as Id<'constituent'>)).toMatchObject({ low: 58n * PERCENT, high: 77n * PERCENT });
	});
	test('none where the others alone are above 100', () => {
		const room = roomOf([constituent('a', 0, 10), constituent('b', 60, 70), constituent('c', 50, 60)]);
		expect(room.get('a' as Id<'constituent'>)).toBeNull();
	});
	test('a minimum above it empties the set, the same minimum at its edge does not', () => {
		const range = fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 40 }));
		fc.assert(
			fc.property(fc.array(range, { minLength: 1, maxLength: 4 }), (ranges) => {
				const others = ranges.map(([low, width], at) => constituent(`o${at}`, low, Math.min(100, low + width)));
				const room = roomOf([constituent('a', 0, 100), ...others]).get('a' as Id<'constituent'>);
				if (!room) return;
				const edge = Number(room.high / PERCENT);
				const kinds = (low: number) => {
					const outcome = resolveMaterial(version([constituent('a', low, 100), ...others]));
					return outcome.ok ? [] : outcome.faults.map(({ kind }) => kind);
				};
				expect(kinds(edge)).not.toContain('minimaAbove100');
				if (edge < 100) expect(kinds(edge + 1)).toContain('minimaAbove100');
			})
		);
	});
});
