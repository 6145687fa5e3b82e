import type { MarketRule } from './market';
import type { ColourName, NameBook, NameDoubt, SubstanceIdentity } from './types';

const SALTS: readonly (readonly [RegExp, NonNullable<ColourName['form']>])[] = [
	[/\b(na|sodium)\b/i, 'sodium'],
	[/\b(ca|calcium)\b/i, 'calcium'],
	[/\b(nh4|ammonium)\b/i, 'ammonium'],
	[/\bacid\b/i, 'acid']
];

/** A colour index number inside a name such as "CI 77891" or "CI 15850:1 (Ca) lake", or null. */
export const colourIndexIn = (inci: string): string | null => /^\s*ci\s*(\d{5,6})\b/i.exec(inci)?.[1] ?? null;

/** A colourant's name: its CI number, or in the United States the name under which it is listed. */
export function colourantName(
	rule: MarketRule,
	identity: SubstanceIdentity,
	book: NameBook
): { readonly name: string; readonly doubt: NameDoubt | null } {
	if (rule.names === 'unitedStates') return listedName(identity, book);
	const { colourIndex, inci } = identity;
	return { name: colourIndex === null ? inci : `CI ${colourIndex}`, doubt: null };
}

/**
 * The listed name behind a number is not one to one: the salt decides. What the name of the constituent does not tell is asked,
 * and the first candidate is printed until then. Source: 21 CFR 73, 74, 82.
 */
function listedName(identity: SubstanceIdentity, { colours }: NameBook) {
	const { inci, colourIndex } = identity;
	if (colourIndex === null) return { name: inci, doubt: null };
	const rows = colours.filter(({ number }) => number === colourIndex);
	const [first] = rows;
	if (!first) return { name: `CI ${colourIndex}`, doubt: { kind: 'colourUnknown' } as const };
	const told = narrowed(rows, inci);
	const names = [...new Set((told.length > 0 ? told : rows).map((row) => lakeName(row, inci)))];
	const [name = first.short] = names;
	return { name, doubt: names.length > 1 ? ({ kind: 'colourForm', candidates: names } as const) : null };
}

function narrowed(rows: readonly ColourName[], inci: string): readonly ColourName[] {
	const suffix = /\d{5}(:\d)/.exec(inci)?.[1];
	const salt = SALTS.find(([pattern]) => pattern.test(inci))?.[1];
	if (suffix) return rows.filter((row) => row.suffix === suffix);
	if (salt) return rows.filter((row) => row.form === salt);
	return rows;
}

/** A lake is named so; the metal may be left out of the short form. Pigments exempt from certification have no lakes. */
const lakeName = ({ short, certified }: ColourName, inci: string) =>
	certified && /\blake\b/i.test(inci) ? `${short} Lake` : short;

/** By the number of the colour index, ascending; names without one behind, by the alphabet. */
export function compareByIndex(
	a: { readonly index: string | null; readonly name: string },
	b: { readonly index: string | null; readonly name: string }
): number {
	if (a.index !== null && b.index !== null && a.index !== b.index)
		return Number(BigInt(a.index) - BigInt(b.index)) < 0 ? -1 : 1;
	if ((a.index === null) !== (b.index === null)) return a.index === null ? 1 : -1;
	return a.name.toLowerCase() < b.name.toLowerCase() ? -1 : a.name.toLowerCase() > b.name.toLowerCase() ? 1 : 0;
}
