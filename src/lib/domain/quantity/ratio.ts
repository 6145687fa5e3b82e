import { divide, formatExact, formatFixed, type Direction } from './decimal';
import { compare, type Ratio } from './units';

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
const magnitude = (value: bigint) => (value < 0n ? -value : value);

/** A reduced fraction with a positive denominator. @throws RangeError when den is zero. */
export function ratio(num: bigint, den: bigint): Ratio {
	if (den === 0n) throw new RangeError('a ratio needs a denominator');
	const divisor = gcd(magnitude(num), magnitude(den)) || 1n;
	const sign = den < 0n ? -1n : 1n;
	return { num: (sign * num) / divisor, den: (sign * den) / divisor };
}

export const compareRatios = (a: Ratio, b: Ratio): number => compare(a.num * b.den, b.num * a.den);

/**
 * As a decimal, the value being in 10^-decimals: exact where it ends within `decimals + places`, else rounded to `places`
 * decimals in the stated direction.
 */
export function formatRatio(value: Ratio, decimals: number, places: number, direction: Direction): string {
	const scaled = value.num * 10n ** BigInt(places);
	if (scaled % value.den === 0n) return formatExact(scaled / value.den, places + decimals);
	const step = value.den * 10n ** BigInt(decimals);
	return formatFixed(divide(scaled, step, direction), places, places, direction);
}
