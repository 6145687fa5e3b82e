import type { CompositionRow } from '../composition/types';
import { substanceKey } from '../material/substance-key';
import { colourantName } from './colour-names';
import type { MarketRule } from './market';
import type { NameBook, NameDoubt, SubstanceIdentity } from './types';

/** Perfume and aromatic compositions carry one word each (Art. 19(1)(g)); the usual English names lead to it. */
const PERFUME_WORDS: ReadonlyMap<string, 'Parfum' | 'Aroma'> = new Map([
	['parfum', 'Parfum'],
	['fragrance', 'Parfum'],
	['perfume', 'Parfum'],
	['aroma', 'Aroma'],
	['flavor', 'Aroma'],
	['flavour', 'Aroma']
]);
const WATER_WORDS = new Set(['aqua', 'water', 'eau']);
/** 21 CFR 701.3(a): the English words. */
const US_WORDS = { Parfum: 'Fragrance', Aroma: 'Flavor', Aqua: 'Water' } as const;
/** All three forms of the schedule together (Cosmetic Regulations, s. 21.2(4)(c)). */
const CANADIAN_WATER = 'Aqua/Water/Eau';

export interface DeclaredName {
	readonly name: string;
	readonly doubt: NameDoubt | null;
}
type Named = Pick<CompositionRow, 'use' | 'nano'>;

/** The name that a market prints, with what leaves it in doubt; "(nano)" where the market asks for it. */
export function declaredName(rule: MarketRule, row: Named, identity: SubstanceIdentity, book: NameBook): DeclaredName {
	const { name, doubt } =
		row.use === 'colourant'
			? colourantName(rule, identity, book)
			: { name: plainName(rule, identity, book), doubt: null };
	return { name: row.nano && rule.nano ? `${name} (nano)` : name, doubt };
}

/** The word that stands for a perfume or an aroma as a whole, or null for any other substance. */
export const perfumeWord = (identity: SubstanceIdentity) => PERFUME_WORDS.get(identity.key) ?? null;

function plainName(rule: MarketRule, identity: SubstanceIdentity, book: NameBook): string {
	const perfume = perfumeWord(identity);
	switch (rule.names) {
		case 'glossary':
			return perfume ?? (WATER_WORDS.has(identity.key) ? 'Aqua' : identity.inci);
		case 'unitedStates':
			if (perfume) return US_WORDS[perfume];
			if (WATER_WORDS.has(identity.key)) return US_WORDS.Aqua;
			return book.technical.get(identity.key)?.inci ?? withCommonName(identity.inci, book);
		case 'canada':
			if (perfume) return perfume;
			if (WATER_WORDS.has(identity.key)) return CANADIAN_WATER;
			return book.technical.get(identity.key)?.technical ?? withCommonName(identity.inci, book);
	}
}

const LATIN_WORDS = 4;
/**
 * "Genus Species (Common) Part": the plant's common English name behind its Latin one. Unchanged where the name has one, is no
 * plant of the book, or where the genus is the common name.
 */
function withCommonName(inci: string, { plants }: NameBook): string {
	if (inci.includes('(')) return inci;
	const words = inci.split(' ');
	for (let count = Math.min(LATIN_WORDS, words.length - 1); count >= 2; count -= 1) {
		const latin = words.slice(0, count).join(' ');
		const common = plants.get(substanceKey(latin));
		if (common === undefined) continue;
		if (common.toLowerCase() === words[0]?.toLowerCase()) return inci;
		return `${latin} (${common}) ${words.slice(count).join(' ')}`;
	}
	return inci;
}

/** Names in the order of the alphabet, whatever their case; equal but for case, by code point. */
export function compareNames(a: string, b: string): number {
	const [left, right] = [a.toLowerCase(), b.toLowerCase()];
	if (left !== right) return left < right ? -1 : 1;
	return a < b ? -1 : a > b ? 1 : 0;
}
