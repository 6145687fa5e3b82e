import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formatRatio } from '../quantity/ratio';
import type { Id } from '../quantity/units';
import { requestOf, type Formulas, type Materials } from '../testing/formula';
import { batchSheet } from './batch-sheet';

const pure = (inci: string) => [{ inci, typical: '100' }];
const MATERIALS: Materials = { water: pure('Aqua'), oil: pure('Squalane'), salt: pure('Sodium Chloride') };

function sheet(formulas: Formulas, size: bigint, step: bigint, formula = 'F') {
	const outcome = batchSheet(requestOf(MATERIALS, formulas, formula), { size, step });
	if (!outcome.ok) throw new Error(outcome.faults.map(({ kind }) => kind).join());
	return outcome.value;
}
const amountsOf = (lines: ReturnType<typeof sheet>) =>
	lines.map(({ material, amount }) => [material as string, Number(amount)]);

describe('a batch sheet', () => {
	test('the q.s. line takes what the others round away', () => {
		// 1,000 g on a balance of 1 g: 33.3333 % is 333 g, twice; water is 334 g, not the 333.334 g it would be.
		const F = [
			{ material: 'oil', percent: '33.3333' },
			{ material: 'salt', percent: '33.3333' },
			{ material: 'water', qs: true }
		];
		expect(amountsOf(sheet({ F }, 1000n, 1n))).toEqual([
			['oil', 333],
			['salt', 333],
			['water', 334]
		]);
	});

	test('without a q.s. line the largest remainders are rounded up', () => {
		// Three equal thirds of 100 steps cannot be: 33.4 → 34 by the largest remainder, 33.3 → 33.
		const F = [
			{ material: 'oil', percent: '33.3' },
			{ material: 'salt', percent: '33.3' },
			{ material: 'water', percent: '33.4' }
		];
		expect(amountsOf(sheet({ F }, 100n, 1n))).toEqual([
			['oil', 33],
			['salt', 33],
			['water', 34]
		]);
	});

	test('a bulk is followed down to its materials, and its own q.s. line takes the rounding of the outer one', () => {
		const formulas: Formulas = {
			BASE: [
				{ material: 'oil', percent: '12.5' },
				{ material: 'water', qs: true }
			],
			F: [
				{ formula: 'BASE', qs: true },
				{ material: 'salt', percent: '3' }
			]
		};
		const lines = sheet(formulas, 4000n, 1n);
		// 4,000 g × 97 % × 12.5 % = 485 g; salt 120 g; water the rest.
		expect(amountsOf(lines)).toEqual([
			['oil', 485],
			['water', 3395],
			['salt', 120]
		]);
		expect(lines.map(({ formulas: above }) => above)).toEqual([['F', 'BASE'], ['F', 'BASE'], ['F']]);
	});

	test('the exact amount stands beside the rounded one', () => {
		const F = [
			{ material: 'salt', percent: '0.123456' },
			{ material: 'water', qs: true }
		];
		const [salt] = sheet({ F }, 1000n, 1n);
		expect(salt && formatRatio(salt.exact, 0, 8, 'nearest')).toBe('1.23456');
		expect(salt?.amount).toBe(1n);
	});

	test('a lot of less content is weighed more, and the q.s. line gives way', () => {
		const F = [
			{ material: 'oil', percent: '10' },
			{ material: 'water', qs: true }
		];
		const potency = new Map([['oil' as Id<'material'>, { num: 100n, den: 80n }]]);
		const outcome = batchSheet(requestOf(MATERIALS, { F }, 'F'), { size: 1000n, step: 1n, potency });
		// 100 g of oil at 80 % of its nominal content: 125 g; water 875 g instead of 900 g.
		expect(outcome.ok && amountsOf(outcome.value)).toEqual([
			['oil', 125],
			['water', 875]
		]);
	});

	test('without a q.s. line no lot can be corrected', () => {
		const F = [
			{ material: 'oil', percent: '10' },
			{ material: 'water', percent: '90' }
		];
		const potency = new Map([['oil' as Id<'material'>, { num: 100n, den: 80n }]]);
		const outcome = batchSheet(requestOf(MATERIALS, { F }, 'F'), { size: 1000n, step: 1n, potency });
		expect(!outcome.ok && outcome.faults.map(({ kind }) => kind)).toEqual(['potencyWithoutQs']);
	});

	test('a size that is no multiple of the step is no batch', () => {
		expect(() => sheet({ F: [{ material: 'water', qs: true }] }, 1005n, 10n)).toThrow(RangeError);
	});

	test('whatever the lines, the amounts are whole steps and sum to the batch', () => {
		const weights = fc.array(fc.integer({ min: 1, max: 9_000_000 }), { minLength: 1, maxLength: 10 });
		fc.assert(
			fc.property(weights, fc.integer({ min: 1, max: 5000 }), fc.boolean(), (parts, steps, qs) => {
				const used = parts.reduce((sum, part) => sum + part, 0);
				const text = (value: number) => (value / 1_000_000).toFixed(6);
				const lines = parts.map((part) => ({ material: 'oil', percent: text(part) }));
				const rest = qs ? { material: 'water', qs } : { material: 'water', percent: text(100_000_000 - used) };
				const amounts = sheet({ F: [...lines, rest] }, BigInt(steps) * 7n, 7n).map(({ amount }) => amount);
				expect(amounts.reduce((sum, amount) => sum + amount, 0n)).toBe(BigInt(steps) * 7n);
				expect(amounts.every((amount) => amount % 7n === 0n)).toBe(true);
			})
		);
	});
});
