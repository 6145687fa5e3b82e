import { compose } from '../src/lib/domain/composition/compose';
import type { CompositionRequest } from '../src/lib/domain/composition/types';
import { ingredientList } from '../src/lib/domain/ingredients/list';
import { MARKETS, type SubstanceIdentity } from '../src/lib/domain/ingredients/types';
import type { MaterialVersion } from '../src/lib/domain/material/types';
import type { Id, IsoDate, LineShare, PartShare } from '../src/lib/domain/quantity/units';
import { ALLERGENS, NAME_BOOK } from '../src/lib/reference';

// Absolute figures depend on the machine; the ratio to the plain loop of the same run is what may be compared.
const LINES = 40;
const PARTS = 3;
const ROUNDS = 20;
const SUBSTANCES = 60;
/** Every fourth supplier states a range; the others state figures. */
const RANGED_EVERY = 4;
const figures = (low: bigint | null, typical: bigint | null, high: bigint | null) => ({
	low: low as PartShare | null,
	typical: typical as PartShare | null,
	high: high as PartShare | null,
	highOpen: false
});
const RANGE = figures(3_000_000_000n, null, 3_600_000_000n);
const SINGLE = [6_000_000_000n, 3_000_000_000n, 1_000_000_000n].map((share) => figures(null, share, null));
/** Falling as in a real formula: much of the first, traces of the last; the last line takes what is left. */
const WHOLE = 100_000_000n;
const SHARES = Array.from({ length: LINES - 1 }, (_, line) => 23_000_000n / BigInt(line + 1));
const REST = WHOLE - SHARES.reduce((sum, share) => sum + share, 0n);

const substanceOf = (line: number, part: number) =>
	`substance ${(line * PARTS + part * 7) % SUBSTANCES}` as Id<'substance'>;

function material(line: number): MaterialVersion {
	const id = `material ${line}`;
	return {
		id: id as Id<'materialVersion'>,
		material: id as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		contentHash: null,
		constituents: Array.from({ length: PARTS }, (_, part) => ({
			id: `${id}/${part}` as Id<'constituent'>,
			substance: substanceOf(line, part),
			declared: line % RANGED_EVERY === 0 ? RANGE : SINGLE[part]!,
			nano: false,
			use: 'other' as const,
			source: null,
			place: 'inSum' as const,
			role: 'ingredient' as const
		}))
	};
}

const materials = new Map(
	Array.from({ length: LINES }, (_, line) => [`material ${line}` as Id<'material'>, material(line)])
);
const request: CompositionRequest = {
	formula: 'F' as Id<'formula'>,
	materials,
	formulas: new Map([
		[
			'F' as Id<'formula'>,
			{
				formula: 'F' as Id<'formula'>,
				version: 'F' as Id<'formulaVersion'>,
				lines: Array.from({ length: LINES }, (_, line) => ({
					id: `line ${line}` as Id<'line'>,
					phase: 'A',
					material: `material ${line}` as Id<'material'>,
					amount: { kind: 'share' as const, min: null, share: (SHARES[line] ?? REST) as LineShare, max: null }
				}))
			}
		]
	])
};
const substances = new Map<Id<'substance'>, SubstanceIdentity>(
	Array.from({ length: SUBSTANCES }, (_, at) => {
		const id = `substance ${at}` as Id<'substance'>;
		return [id, { id, inci: id, key: id, cas: [], colourIndex: null }];
	})
);

function exact(): number {
	const outcome = compose(request);
	if (!outcome.ok) throw new Error('the benchmark formula is faulty');
	return MARKETS.reduce(
		(names, market) =>
			names +
			ingredientList(outcome.value, {
				market,
				stay: 'leave-on',
				batchDay: '2026-12-01' as IsoDate,
				substances,
				allergens: ALLERGENS[market],
				names: NAME_BOOK
			}).entries.length,
		0
	);
}

const PLAIN_PARTS = [60, 30, 10];

function plain(): number {
	const sums = new Map<string, number>();
	for (let line = 0; line < LINES; line++) {
		for (let part = 0; part < PARTS; part++) {
			const key = substanceOf(line, part);
			sums.set(key, (sums.get(key) ?? 0) + (Number(SHARES[line] ?? REST) * PLAIN_PARTS[part]!) / 1e8);
		}
	}
	return [...sums].sort((a, b) => b[1] - a[1]).length;
}

function time(run: () => number): number {
	for (let round = 0; round < 5; round++) run();
	const start = performance.now();
	for (let round = 0; round < ROUNDS; round++) run();
	return (performance.now() - start) / ROUNDS;
}

const [loop, core] = [time(plain), time(exact)];
console.log(`plain floating-point loop over ${LINES} lines:     ${loop.toFixed(3)} ms`);
console.log(`composition and seven lists of the same lines: ${core.toFixed(3)} ms`);
console.log(`ratio: ${(core / loop).toFixed(1)}`);
