import { largestRemainder } from '../material/remainder';
import { divide } from '../quantity/decimal';
import { ratio } from '../quantity/ratio';
import { good, LINE_DECIMALS, type Id, type Outcome, type Ratio } from '../quantity/units';
import { expand, type Leaf } from './expand';
import { judgeAmounts, sharesOf } from './lines';
import type { CompositionFault, CompositionRequest, FormulaVersionLines } from './types';

/** A batch and the step of the balance in one unit of mass, as whole numbers of 10^-decimals of it. */
export interface BatchSize {
	readonly size: bigint;
	readonly step: bigint;
	/**
	 * Nominal over actual content of the lot at hand, by material: a lot of 96 % of its nominal content is weighed 100/96 times.
	 * The q.s. line gives way.
	 */
	readonly potency?: ReadonlyMap<Id<'material'>, Ratio>;
}
export type BatchFault =
	| CompositionFault
	/** A corrected lot needs a q.s. line that gives way, and one that is large enough. */
	| { readonly kind: 'potencyWithoutQs'; readonly formula: Id<'formula'> }
	| { readonly kind: 'potencyAboveQs'; readonly formula: Id<'formula'> };

/** One weighing: what it would be exactly, and what the balance can show. */
export interface BatchLine {
	readonly material: Id<'material'>;
	/** From the outer formula inwards. */
	readonly formulas: readonly Id<'formula'>[];
	readonly path: readonly Id<'line'>[];
	/** In units of the batch size. */
	readonly exact: Ratio;
	/** A multiple of the step. */
	readonly amount: bigint;
	/** Takes what the other lines round away. */
	readonly takesRounding: boolean;
}

/**
 * The weighings of one batch, bulks followed down to materials, at the target of every range line, corrected for the content of
 * the lots. Each is rounded to the step;
 * the q.s. line takes the rounding, so that the amounts sum to the batch exactly; without a q.s. line the largest remainders do.
 * Faults as compose(). @throws RangeError for a size that is no positive multiple of a positive step.
 */
export function batchSheet(
	request: CompositionRequest,
	{ size, step, potency }: BatchSize
): Outcome<readonly BatchLine[], BatchFault> {
	if (step <= 0n || size <= 0n || size % step !== 0n)
		throw new RangeError('a batch is a whole number of balance steps');
	const expanded = expand(request);
	if (!expanded.ok) return expanded;
	const { leaves, formulas } = expanded.value;
	const faults = judgeAmounts(formulas);
	if (faults.length > 0) return { ok: false, faults };
	const shares = sharesOf(formulas, null);
	const taker = takerOf(leaves, formulas);
	const nominal = leaves.map((leaf) => exactAmount(leaf, shares, size));
	const exact = potency ? corrected(leaves, nominal, potency, taker) : nominal;
	if (!exact) return { ok: false, faults: [{ kind: 'potencyWithoutQs', formula: request.formula }] };
	if (exact.some(({ num }) => num < 0n))
		return { ok: false, faults: [{ kind: 'potencyAboveQs', formula: request.formula }] };
	const amounts = rounded(exact, size, step, taker);
	return good(
		leaves.map(({ material, formulas: above, path }, at) => ({
			material,
			formulas: above,
			path,
			exact: exact[at] ?? ratio(0n, 1n),
			amount: amounts[at] ?? 0n,
			takesRounding: at === taker
		}))
	);
}

/** Σ of the shares along the path as a part of the whole, times the batch. */
function exactAmount({ path }: Leaf, shares: ReadonlyMap<Id<'line'>, bigint>, size: bigint): Ratio {
	const whole = 10n ** BigInt(LINE_DECIMALS + 2);
	return path.reduce((part, line) => ratio(part.num * (shares.get(line) ?? 0n), part.den * whole), ratio(size, 1n));
}

/** Every weighing at the content of its lot; what that adds or saves, the q.s. line takes. Null without one. */
function corrected(
	leaves: readonly Leaf[],
	nominal: readonly Ratio[],
	potency: ReadonlyMap<Id<'material'>, Ratio>,
	taker: number
): readonly Ratio[] | null {
	const factors = leaves.map(({ material }, at) => (at === taker ? undefined : potency.get(material)));
	if (factors.every((factor) => factor === undefined)) return nominal;
	if (taker < 0) return null;
	const own = nominal.map(({ num, den }, at) => {
		const factor = factors[at];
		return factor ? ratio(num * factor.num, den * factor.den) : ratio(num, den);
	});
	const given = own.reduce(
		(sum, each, at) => {
			const was = nominal[at] ?? each;
			return ratio(
				sum.num * each.den * was.den + (each.num * was.den - was.num * each.den) * sum.den,
				sum.den * each.den * was.den
			);
		},
		ratio(0n, 1n)
	);
	return own.map((each, at) =>
		at === taker ? ratio(each.num * given.den - given.num * each.den, each.den * given.den) : each
	);
}

/** The weighing behind the outer q.s. line: itself, or inside a bulk that bulk's own q.s. line. */
function takerOf(leaves: readonly Leaf[], formulas: readonly FormulaVersionLines[]): number {
	const qs = new Set(
		formulas.flatMap(({ lines }) => lines.filter(({ amount }) => amount.kind === 'qs').map(({ id }) => id))
	);
	return leaves.findIndex(({ path }) => path.every((line) => qs.has(line)));
}

function rounded(exact: readonly Ratio[], size: bigint, step: bigint, taker: number): bigint[] {
	const amounts = exact.map(({ num, den }) => divide(num, den * step, 'nearest') * step);
	const others = amounts.reduce((sum, amount, at) => (at === taker ? sum : sum + amount), 0n);
	// A q.s. line of next to nothing cannot give more than it has.
	if (taker >= 0 && others <= size) return amounts.map((amount, at) => (at === taker ? size - others : amount));
	const den = exact.reduce((common, each) => common * (each.den / gcd(common, each.den)), 1n) * step;
	const nums = exact.map(({ num, den: own }) => num * (den / (own * step)));
	return largestRemainder(nums, den, size / step).map((steps) => steps * step);
}

const gcd = (a: bigint, b: bigint): bigint => (b === 0n ? a : gcd(b, a % b));
