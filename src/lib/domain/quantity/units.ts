/** The units of the core. A scaled integer carries its unit in its type, so that the compiler refuses to mix two. */
declare const unit: unique symbol;

export type Scaled<U extends string> = bigint & { readonly [unit]: U };
/** A line's share of a formula. 1 = 10⁻⁶ %; 100 % = 10⁸. Stored as numeric(9,6). */
export type LineShare = Scaled<'1e-6 % of formula'>;
/** A constituent's share of a material. 1 = 10⁻⁸ %; 100 % = 10¹⁰; 1 is 0.1 ppb. Stored as numeric(11,8). */
export type PartShare = Scaled<'1e-8 % of material'>;
/** A substance's share of a formula. 1 = 10⁻¹⁶ %; 100 % = 10¹⁸. */
export type Percent = Scaled<'1e-16 % of formula'>;
/** An exact fraction; the denominator is positive. */
export interface Ratio {
	readonly num: bigint;
	readonly den: bigint;
}
/** A calendar day, without clock and zone. */
export type IsoDate = string & { readonly [unit]: 'date' };
export type Id<K extends string> = string & { readonly [unit]: K };
export type Sha256 = string & { readonly [unit]: 'sha256' };

export const LINE_DECIMALS = 6;
export const PART_DECIMALS = 8;
export const PERCENT_DECIMALS = 16;
export const WHOLE_LINE = 100_000_000n as LineShare;
export const WHOLE_PART = 10_000_000_000n as PartShare;
export const WHOLE_PERCENT = 1_000_000_000_000_000_000n as Percent;

export const plus = <U extends string>(a: Scaled<U>, b: Scaled<NoInfer<U>>) => (a + b) as Scaled<U>;
export const sum = <U extends string>(values: readonly Scaled<U>[]) => values.reduce((a, b) => a + b, 0n) as Scaled<U>;
export const compare = (a: bigint, b: bigint): number => (a < b ? -1 : a > b ? 1 : 0);
export const least = <Q extends bigint>(a: Q, b: Q): Q => (a < b ? a : b);
export const most = <Q extends bigint>(a: Q, b: Q): Q => (a > b ? a : b);

/** A constituent's share of the formula, exactly: weight in 10⁻⁶ % × part in 10⁻⁸ % ÷ 100 % is in 10⁻¹⁶ % without rounding. */
export const share = (weight: LineShare, part: PartShare) => (weight * part) as Percent;

/** What a computation gives: a value, or the faults of the trade that prevent one. Faults are data, never thrown. */
export type Outcome<T, F> =
	{ readonly ok: true; readonly value: T } | { readonly ok: false; readonly faults: readonly F[] };
export const good = <T>(value: T): { readonly ok: true; readonly value: T } => ({ ok: true, value });
export const faulty = <F>(...faults: readonly F[]): { readonly ok: false; readonly faults: readonly F[] } => ({
	ok: false,
	faults
});
