import { z } from 'zod';
import type { Market } from '../schemas/market';
import {
	allergenRowSchema,
	ruleTextSchema,
	type Allergen,
	type AllergenRow,
	type RuleText
} from '../schemas/reference';
import { ALLERGEN_ROWS } from './allergens';
import { ARTICLES } from './articles';
import { MARKET_ARTICLES } from './market-articles';

export { NAME_BOOK } from './market-names';

/** The state that this reference was written at; it is printed wherever a rule was applied. */
export const RULE_BOOK_NAME = 'EU 2026.11';

const COSMETICS_ACT = 'eu-1223-2009';
/** New names bind batches placed from this day; until the day before the older list sufficed ((EU) 2023/1545). */
const NEW_NAMES_FROM = '2026-08-01';
/** 0.001 % leave-on and 0.01 % rinse-off, in 10⁻¹⁶ %. */
const LEAVE_ON_ABOVE = 10_000_000_000_000n as Allergen['leaveOnAbove'];
const RINSE_OFF_ABOVE = 100_000_000_000_000n as Allergen['rinseOffAbove'];

const allergenEntry = (row: AllergenRow) => `annex-iii-${row.entry.toLowerCase()}`;

const rows = z.array(allergenRowSchema).parse(ALLERGEN_ROWS);

/** The fragrance allergens of the EU, as the core reads them. */
export const EU_ALLERGENS: readonly Allergen[] = rows.map((row) => ({
	ruleId: `${COSMETICS_ACT}/${allergenEntry(row)}`,
	labelName: row.labelName,
	// The annex gives numbers for the entry, not per name; an entry is found by any of them.
	members: [...row.members, ...(row.alsoKnown ?? [])].map((inci, at) => ({ inci, cas: at === 0 ? row.cas : [] })),
	leaveOnAbove: LEAVE_ON_ABOVE,
	rinseOffAbove: RINSE_OFF_ABOVE,
	placedFrom: row.before2023 ? null : (NEW_NAMES_FROM as Allergen['placedFrom'])
}));

/** The classic names, as Great Britain keeps them. [M] in the fact base: (EU) 2023/1545 was not adopted there. */
const GB_ALLERGENS = EU_ALLERGENS.filter(({ placedFrom }) => placedFrom === null);
/** Canada took the EU's table over by reference, with days of its own (Cosmetic Regulations, s. 21.4(5)). */
const CANADA_CLASSIC_FROM = '2026-04-12' as Allergen['placedFrom'];
const CANADA_FIRST_SOLD_FROM = '2026-08-01' as NonNullable<Allergen['placedFrom']>;
const CANADA_EXISTING_FROM = '2028-08-01' as Allergen['placedFrom'];
const CA_ALLERGENS: readonly Allergen[] = EU_ALLERGENS.map((entry) =>
	entry.placedFrom === null
		? { ...entry, placedFrom: CANADA_CLASSIC_FROM }
		: { ...entry, placedFrom: CANADA_EXISTING_FROM, firstSoldFrom: CANADA_FIRST_SOLD_FROM }
);

/** The allergen entries that a market names; none in the United States, Australia and ASEAN. */
export const ALLERGENS: Readonly<Record<Market, readonly Allergen[]>> = {
	EU: EU_ALLERGENS,
	GB: GB_ALLERGENS,
	US: [],
	CA: CA_ALLERGENS,
	AU: [],
	ASEAN: [],
	CH: EU_ALLERGENS
};

const allergenText = (row: AllergenRow): RuleText => ({
	act: COSMETICS_ACT,
	entry: allergenEntry(row),
	citation: `Reg. (EC) 1223/2009, Annex III, ${row.entry}`,
	title: row.labelName,
	text: row.before2023
		? `Named in the list above 0.001 % in leave-on and above 0.01 % in rinse-off products, whatever brought it in.`
		: `Named in the list above 0.001 % in leave-on and above 0.01 % in rinse-off products, whatever brought it in, for batches placed after 31 July 2026. Older stock may be sold until 31 July 2028.`,
	source: 'Annex III as amended by (EU) 2023/1545; Commission export of 31 October 2025',
	from: row.before2023 ? null : NEW_NAMES_FROM,
	until: null,
	standing: 'confirmed'
});

const RULES: readonly RuleText[] = z
	.array(ruleTextSchema)
	.parse([...ARTICLES, ...MARKET_ARTICLES, ...rows.map(allergenText)]);
const BY_ID: ReadonlyMap<string, RuleText> = new Map(RULES.map((rule) => [`${rule.act}/${rule.entry}`, rule]));

export const allRules = (): readonly RuleText[] => RULES;
/** The rule behind an id such as "eu-1223-2009/art-19-1-g", or undefined. */
export const ruleById = (id: string): RuleText | undefined => BY_ID.get(id);
export const idOf = (rule: RuleText): string => `${rule.act}/${rule.entry}`;
