import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { decimalOf, formatExact } from '../quantity/decimal';
import { sum, WHOLE_PART, type Id, type PartShare } from '../quantity/units';
import { resolveMaterial } from './resolve';
import type { Constituent, MaterialVersion, ResolvedMaterial } from './types';

/** "50-60" range, "50-60~55" with a typical, "5" one figure, "<0.1" open maximum, "≤5" maximum, "" balance. */
function declared(text: string): Constituent['declared'] {
	const figure = (part: string | undefined) => (part ? (decimalOf(part, 8) as PartShare) : null);
	const [, sign, low, high, typical] = /^([<≤]?)([\d.]*)(?:-([\d.]+))?(?:~([\d.]+))?$/.exec(text) ?? [];
	if (sign) return { low: null, typical: figure(typical), high: figure(low), highOpen: sign === '<' };
	if (high) return { low: figure(low), typical: figure(typical), high: figure(high), highOpen: false };
	return { low: null, typical: figure(low), high: null, highOpen: false };
}

/** Figures by name; "child of parent" stands inside its parent. */
function material(figures: Readonly<Record<string, string>>): MaterialVersion {
	const constituents = Object.entries(figures).map(([name, text]): Constituent => {
		const [own = name, parent] = name.split(' of ');
		const common = {
			id: own as Id<'constituent'>,
			substance: own as Id<'substance'>,
			declared: declared(text),
			nano: false,
			use: 'other',
			source: null
		} as const;
		return parent
			? { ...common, place: 'ofWhich', parent: parent as Id<'constituent'> }
			: { ...common, place: 'inSum', role: 'ingredient' };
	});
	return {
		id: 'version' as Id<'materialVersion'>,
		material: 'material' as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		constituents,
		contentHash: null
	};
}

function resolved(figures: Readonly<Record<string, string>>): Record<string, string> {
	const outcome = resolveMaterial(material(figures));
	if (!outcome.ok) throw new Error(outcome.faults.map(({ kind }) => kind).join());
	return Object.fromEntries(outcome.value.parts.map(({ of, share }) => [of.id, written(share)]));
}
const written = ({ low, high, highOpen, typical, basis }: ResolvedMaterial['parts'][number]['share']) =>
	`${formatExact(low, 8)}-${highOpen ? '<' : ''}${formatExact(high, 8)} ~${formatExact(typical, 8)} ${basis}`;

const faults = (figures: Readonly<Record<string, string>>) => {
	const outcome = resolveMaterial(material(figures));
	return outcome.ok ? [] : outcome.faults;
};
const percent = (text: string) => decimalOf(text, 8);

describe('single figures', () => {
	test('that sum to 100 stand as they are', () => {
		expect(resolved({ a: '99.5', b: '0.5' })).toEqual({ a: '99.5-99.5 ~99.5 declared', b: '0.5-0.5 ~0.5 declared' });
	});
	test('within 0.5 of 100 are normalised; position breaks the tie of the last unit', () => {
		const found = resolved({ a: '33.2', b: '33.2', c: '33.2' });
		expect(found).toEqual({
			a: '33.33333334-33.33333334 ~33.33333334 normalised',
			b: '33.33333333-33.33333333 ~33.33333333 normalised',
			c: '33.33333333-33.33333333 ~33.33333333 normalised'
		});
	});
	test('exactly 0.5 off is normalised, a hair more is contradictory, by how much', () => {
		expect(faults({ a: '60', b: '40.5' })).toEqual([]);
		expect(faults({ a: '60', b: '40.50000001' })).toEqual([{ kind: 'minimaAbove100', by: percent('0.50000001') }]);
		expect(faults({ a: '60', b: '39.4' })).toEqual([{ kind: 'maximaBelow100', by: percent('0.6') }]);
	});
});

describe('ranges', () => {
	test('are narrowed by the sum', () => {
		expect(resolved({ a: '50-60', b: '', c: '0.01-0.1', d: '0.4' })).toEqual({
			a: '50-60 ~55 derived',
			b: '39.5-49.59 ~44.545 derived',
			c: '0.01-0.1 ~0.055 derived',
			d: '0.4-0.4 ~0.4 declared'
		});
	});
	test('an open bound stays open while it is the highest', () => {
		expect(resolved({ a: '<1', b: '' })).toMatchObject({ a: '0-<1 ~0.5 derived' });
		expect(resolved({ a: '≤1', b: '' })).toMatchObject({ a: '0-1 ~0.5 derived' });
		expect(resolved({ a: '<5', b: '98-100' })).toMatchObject({ a: '0-2 ~1 derived' });
	});
	test('minima above or maxima below 100 contradict, by how much', () => {
		expect(faults({ a: '60-70', b: '50-60' })).toEqual([{ kind: 'minimaAbove100', by: percent('10') }]);
		expect(faults({ a: '10-20', b: '10-70' })).toEqual([{ kind: 'maximaBelow100', by: percent('10') }]);
	});
	test('upside down', () => expect(faults({ a: '6-5', b: '' })).toEqual([{ kind: 'rangeUpsideDown', at: 'a' }]));
	test('nothing in the sum', () => expect(faults({})).toEqual([{ kind: 'noConstituents' }]));
});

describe('typical values', () => {
	test('declared ones stay, the rest is solved', () => {
		expect(resolved({ a: '50-60~58', b: '30-50', c: '' })).toMatchObject({
			a: '50-60 ~58 declared',
			b: '30-50 ~36 derived',
			c: '0-20 ~6 derived'
		});
	});
	test('outside the narrowed range they are refused and named with it', () => {
		expect(faults({ a: '40-60~59', b: '45-60' })).toEqual([
			{ kind: 'typicalOutsideRange', at: 'a', range: { low: percent('40'), high: percent('55'), highOpen: false } }
		]);
	});
	test('outside their own range too, also in a list of single figures', () => {
		expect(faults({ a: '50-50~51', b: '50' })).toMatchObject([{ kind: 'typicalOutsideRange', at: 'a' }]);
	});
	test('all declared but not 100: normalised within 0.5, refused beyond', () => {
		expect(resolved({ a: '40-60~50', b: '40-60~49.6' })).toEqual({
			a: '40-60 ~50.19607843 normalised',
			b: '40-60 ~49.80392157 normalised'
		});
		expect(faults({ a: '40-60~50', b: '40-60~49' })).toEqual([{ kind: 'typicalsOffBy', by: percent('1') }]);
	});
	test('some declared so that the rest cannot fill the 100', () => {
		expect(faults({ a: '40-60~41', b: '30-55~30', c: '0-20' })).toEqual([{ kind: 'typicalsOffBy', by: percent('9') }]);
	});
});

describe('parts of parts', () => {
	test('are shares of the material and capped by their parent', () => {
		expect(resolved({ p: '10', s: '90', 'l of p': '2-20', 'm of p': '0.3' })).toEqual({
			p: '10-10 ~10 declared',
			s: '90-90 ~90 declared',
			l: '2-9.7 ~5.85 derived',
			m: '0.3-0.3 ~0.3 declared'
		});
	});
	test('together at most their parent', () => {
		expect(faults({ p: '10', s: '90', 'l of p': '6', 'm of p': '5' })).toMatchObject([
			{ kind: 'partsAboveParent', parent: 'p', by: percent('1') }
		]);
		expect(resolved({ p: '10', s: '90', 'l of p': '6', 'm of p': '0-8' })).toMatchObject({ m: '0-4 ~2 derived' });
	});
	test('declared typicals together at most the parent’s', () => {
		expect(faults({ p: '10', s: '90', 'l of p': '0-9~6', 'm of p': '0-9~5' })).toEqual([
			{ kind: 'partsAboveParent', parent: 'p', by: percent('1') }
		]);
	});
	test('derived typicals leave room for one another', () => {
		expect(resolved({ p: '10', s: '90', 'l of p': '≤10', 'm of p': '≤10', 'n of p': '≤10' })).toMatchObject({
			l: '0-10 ~3.33333333 derived',
			n: '0-10 ~3.33333333 derived'
		});
	});
	test('raise the least of a parent given as a range', () => {
		expect(resolved({ p: '0-20', s: '', 'l of p': '5-8' })).toMatchObject({ p: '5-20 ~12.5 derived' });
	});
	test('a parent must stand in the sum', () => {
		expect(faults({ p: '100', 'l of p': '5', 'm of l': '1' })).toEqual([{ kind: 'parentUnknown', at: 'm' }]);
		expect(faults({ p: '100', 'l of q': '5' })).toEqual([{ kind: 'parentUnknown', at: 'l' }]);
	});
});

const range = fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 60 }));
const ranges = fc.array(range, { minLength: 2, maxLength: 6 });
const named = (all: readonly (readonly [number, number])[], name = (at: number) => `c${at}`) =>
	material(Object.fromEntries(all.map(([low, width], at) => [name(at), `${low}-${low + width}`])));
const partsBy = (version: MaterialVersion) => {
	const outcome = resolveMaterial(version);
	return outcome.ok ? new Map(outcome.value.parts.map((part) => [part.of.id as string, part.share])) : null;
};

describe('whatever the ranges', () => {
	test('typicals sum to 100 and lie within their ranges, which lie within what was declared', () => {
		fc.assert(
			fc.property(ranges, (all) => {
				const version = named(all);
				const parts = partsBy(version);
				if (!parts) return;
				expect(sum([...parts.values()].map(({ typical }) => typical))).toBe(WHOLE_PART);
				for (const { id, declared: said } of version.constituents) {
					const share = parts.get(id);
					expect(share && share.low <= share.typical && share.typical <= share.high).toBe(true);
					expect(share && share.low >= (said.low ?? 0n) && share.high <= (said.high ?? WHOLE_PART)).toBe(true);
				}
			})
		);
	});
	test('their order changes no bound, and no typical by more than the last unit', () => {
		fc.assert(
			fc.property(ranges, (all) => {
				const [forth, back] = [
					partsBy(named(all)),
					partsBy(named([...all].reverse(), (at) => `c${all.length - 1 - at}`))
				];
				expect(forth === null).toBe(back === null);
				for (const [id, share] of forth ?? []) {
					const other = back?.get(id);
					expect([other?.low, other?.high]).toEqual([share.low, share.high]);
					const off = share.typical - (other?.typical ?? 0n);
					expect(off >= -1n && off <= 1n).toBe(true);
				}
			})
		);
	});
	test('a narrower range never widens another', () => {
		fc.assert(
			fc.property(ranges, fc.nat(), (all, pick) => {
				const at = pick % all.length;
				const narrower = all.map(([low, width], index): [number, number] =>
					index === at && width > 1 ? [low + 1, width - 2] : [low, width]
				);
				const [wide, narrow] = [partsBy(named(all)), partsBy(named(narrower))];
				if (!wide || !narrow) return;
				for (const [id, share] of narrow) {
					const other = wide.get(id);
					expect(other && share.low >= other.low && share.high <= other.high).toBe(true);
				}
			})
		);
	});
});
