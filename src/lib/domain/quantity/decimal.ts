import { compare } from './units';

export type DecimalFault =
	'empty' | 'notANumber' | 'grouping' | 'negative' | 'tooManyDecimals' | 'tooLong' | 'aboveMost';
export type ParsedDecimal =
	| { readonly ok: true; readonly value: bigint }
	| { readonly ok: false; readonly why: DecimalFault; readonly limit: string | null };

export interface DecimalLimits {
	/** Digits after the sign that the scale holds; the value comes back in 10^-decimals. */
	readonly decimals: number;
	/** Largest value taken, on the same scale. */
	readonly max?: bigint;
}

const LONGEST = 40;
const PLAIN = /^(\d+)(?:[.,](\d+))?$/;
const GROUPED = /^\d{1,3}([.,\u0020\u00a0\u202f'’]\d{3})+([.,]\d+)?$|^\d+[.,]\d+[.,]\d+$|\d[\u0020\u00a0\u202f'’]\d/;

const no = (why: DecimalFault, limit: string | null = null): ParsedDecimal => ({ ok: false, why, limit });

/**
 * Reads a decimal as a person types it: "," or "." as the sign, no grouping, no exponent, not negative.
 * The value is exact, in units of 10^-decimals. "1,000" is one, to three places: one sign can only be the decimal sign.
 */
export function parseDecimal(text: string, { decimals, max }: DecimalLimits): ParsedDecimal {
	const trimmed = text.trim();
	if (trimmed === '') return no('empty');
	if (trimmed.length > LONGEST) return no('tooLong', String(LONGEST));
	if (/^[-−]\s*\d/.test(trimmed)) return no('negative', '0');
	const match = PLAIN.exec(trimmed);
	if (!match) return no(GROUPED.test(trimmed) ? 'grouping' : 'notANumber');
	const fraction = (match[2] ?? '').replace(/0+$/, '');
	if (fraction.length > decimals) return no('tooManyDecimals', String(decimals));
	const value = BigInt((match[1] ?? '0') + fraction.padEnd(decimals, '0'));
	if (max !== undefined && compare(value, max) > 0) return no('aboveMost', formatExact(max, decimals));
	return { ok: true, value };
}

/** A decimal the program itself wrote (database, JSON). @throws RangeError: a malformed one is a bug, not bad input. */
export function decimalOf(text: string, decimals: number): bigint {
	const parsed = parseDecimal(text, { decimals });
	if (!parsed.ok) throw new RangeError(`not a decimal of ${decimals} places: ${text} (${parsed.why})`);
	return parsed.value;
}

const tenTo = (places: number) => 10n ** BigInt(places);

/** The shortest text that is exactly the value, "." as the sign. */
export function formatExact(value: bigint, decimals: number): string {
	const sign = value < 0n ? '-' : '';
	const digits = (value < 0n ? -value : value).toString().padStart(decimals + 1, '0');
	const whole = digits.slice(0, digits.length - decimals);
	const fraction = digits.slice(digits.length - decimals).replace(/0+$/, '');
	return sign + whole + (fraction ? `.${fraction}` : '');
}

export type Direction = 'up' | 'down' | 'nearest';

/**
 * Exactly `places` decimals, rounded in the stated direction: concentrations and doses up, margins and permitted maxima down.
 * Computation never uses the result.
 */
export function formatFixed(value: bigint, decimals: number, places: number, direction: Direction): string {
	if (places >= decimals) {
		const [whole, fraction = ''] = formatExact(value, decimals).split('.');
		return places === 0 ? (whole ?? '0') : `${whole}.${fraction.padEnd(places, '0')}`;
	}
	const step = tenTo(decimals - places);
	const kept = divide(value, step, direction);
	const [whole, fraction = ''] = formatExact(kept, places).split('.');
	return places === 0 ? (whole ?? '0') : `${whole}.${fraction.padEnd(places, '0')}`;
}

/** value ÷ step as a whole number, rounded in the stated direction; a half goes up. */
export function divide(value: bigint, step: bigint, direction: Direction): bigint {
	const quotient = value / step;
	const rest = value % step;
	if (rest === 0n) return quotient;
	const floor = rest < 0n ? quotient - 1n : quotient;
	if (direction === 'down') return floor;
	if (direction === 'up') return floor + 1n;
	return (value - floor * step) * 2n >= step ? floor + 1n : floor;
}
