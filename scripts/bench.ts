import { compose } from '../src/lib/domain/composition/compose';
import type { CompositionRequest } from '../src/lib/domain/composition/types';
import { ingredientList } from '../src/lib/domain/ingredients/list';
import type { SubstanceIdentity } from '../src/lib/domain/ingredients/types';
import type { MaterialVersion } from '../src/lib/domain/material/types';
import type { Id, IsoDate, LineShare, PartShare } from '../src/lib/domain/quantity/units';
import { EU_ALLERGENS, NAME_BOOK } from '../src/lib/reference';

// Absolute figures depend on the machine; the ratio to the plain loop of the same run is what may be compared.
const LINES = 40;
const PARTS = 3;
const ROUNDS = 20;
const SUBSTANCES = 60;

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
			declared: {
				low: 3_000_000_000n as PartShare,
				typical: null,
				high: 3_600_000_000n as PartShare,
				highOpen: false
			},
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
					amount: { kind: 'share' as const, min: null, share: 2_500_000n as LineShare, max: null }
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
	const list = ingredientList(outcome.value, {
		market: 'EU',
		stay: 'leave-on',
		batchDay: '2026-12-01' as IsoDate,
		substances,
		allergens: EU_ALLERGENS,
		names: NAME_BOOK
	});
	return list.entries.length;
}

function plain(): number {
	const sums = new Map<string, number>();
	for (let line = 0; line < LINES; line++) {
		for (let part = 0; part < PARTS; part++) {
			const key = substanceOf(line, part);
			sums.set(key, (sums.get(key) ?? 0) + (2.5 * 12.5) / 100);
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
console.log(`plain floating-point loop over ${LINES} lines: ${loop.toFixed(3)} ms`);
console.log(`composition and EU list of the same lines:   ${core.toFixed(3)} ms`);
console.log(`ratio: ${(core / loop).toFixed(1)}`);
