import type { RuleText } from '../schemas/reference';
import { articleOf, type ArticleRow } from './articles';

interface Act {
	readonly act: string;
	/** Stands before each citation. */
	readonly short: string;
	readonly source: string;
	readonly rows: readonly ArticleRow[];
}

/** What asks for the list of ingredients outside the EU; short texts in our own words, the official text prevails. */
const ACTS: readonly Act[] = [
	{
		act: 'gb-1223-2009',
		short: 'Assimilated Reg. 1223/2009 (GB)',
		source: 'Regulation (EC) No 1223/2009 as assimilated in Great Britain, stored revision of 21 January 2026',
		rows: [
			[
				'art-19-1-g',
				'Art. 19(1)(g)',
				'List of ingredients',
				'As in the EU: descending weight when added, below 1 % in any order behind, colourants last, nano in brackets. The allergens are those named before (EU) 2023/1545.',
				'fromMemory'
			],
			['art-33', 'Art. 33', 'Names of ingredients', 'Common ingredient names of the glossary.', 'fromMemory']
		]
	},
	{
		act: 'us-21-cfr-701',
		short: '21 CFR 701',
		source: '21 CFR 701.3, stored copy',
		rows: [
			[
				's-3-f',
				's. 3(a), (f), (g)',
				'Order of the ingredient declaration',
				'Descending predominance; ingredients of not more than 1 % in any order behind the others; colour additives in any order and at any place; colours of some shades only behind the words for it.'
			],
			[
				's-3-c',
				's. 3(c)',
				'Names of ingredients',
				'Common or usual English names: water and fragrance in English, plants with their common name, colour additives under their listed names.'
			]
		]
	},
	{
		act: 'ca-crc-869',
		short: 'Cosmetic Regulations (Canada)',
		source: 'Cosmetic Regulations, C.R.C., c. 869, as in force on 12 April 2026',
		rows: [
			[
				's-21-4',
				's. 21.4',
				'Order of the list, fragrance allergens',
				'Descending weight; 1 % or less and colouring agents in any order behind; parfum and aroma may stand at the end; fragrance allergens above 0.001 % in leave-on and 0.01 % in rinse-off products are named, by the EU’s table with dates of Canada’s own.'
			],
			[
				's-21-2',
				's. 21.2',
				'Names of ingredients',
				'INCI names; the names of the schedule in one of three forms; plants at least by genus and species; the colours of a range behind one of the signs for it.'
			]
		]
	},
	{
		act: 'au-information-standard-2020',
		short: 'Cosmetics Information Standard 2020 (Australia)',
		source: 'Consumer Goods (Cosmetics) Information Standard 2020 (F2020L01469)',
		rows: [
			[
				's-7',
				's. 7',
				'List of ingredients',
				'Descending mass or volume, or: 1 % or more descending, below 1 % in any order, colours in any order behind. English or INCI names.'
			]
		]
	},
	{
		act: 'asean-directive',
		short: 'ASEAN Cosmetic Directive',
		source: 'ASEAN Cosmetic Directive, Appendix II',
		rows: [
			[
				'appendix-ii',
				'Appendix II',
				'List of ingredients',
				'Descending weight when added; below 1 % in any order behind; colours in any order behind the others; plants by genus and species.'
			]
		]
	},
	{
		act: 'ch-817-023-31',
		short: 'VKos (SR 817.023.31)',
		source: 'Ordinance on cosmetics (VKos), SR 817.023.31',
		rows: [
			[
				'art-8',
				'Art. 8',
				'List of ingredients',
				'Descending share when placed on the market; below 1 % in any order behind; colours in any order behind the others; perfume and allergens as in the EU; nano in brackets; names of the EU’s glossary.'
			]
		]
	}
];

export const MARKET_ARTICLES: readonly RuleText[] = ACTS.flatMap(({ act, short, source, rows }) =>
	rows.map(articleOf(act, short, source))
);
