import { compare } from '../quantity/units';

/**
 * Whole numbers that sum to `total` and lie nearest to num_i / den: largest remainder, ties by position.
 * One of the two roundings there are; the sum stays whole.
 */
export function largestRemainder(nums: readonly bigint[], den: bigint, total: bigint): bigint[] {
	const floors = nums.map((num) => num / den);
	let missing = total - floors.reduce((a, b) => a + b, 0n);
	const order = nums
		.map((num, position) => ({ rest: num % den, position }))
		.sort((a, b) => compare(b.rest, a.rest) || a.position - b.position);
	for (const { position } of order) {
		if (missing <= 0n) break;
		floors[position] = (floors[position] ?? 0n) + 1n;
		missing -= 1n;
	}
	return floors;
}
