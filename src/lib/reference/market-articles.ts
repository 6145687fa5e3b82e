import type { RuleText } from '../schemas/reference';

type Row = readonly [
	act: string,
	entry: string,
	citation: string,
	title: string,
	text: string,
	source: string,
	standing?: RuleText['standing']
];

const GB = 'Regulation (EC) No 1223/2009 as assimilated in Great Britain, stored revision of 21 January 2026';
const US = '21 CFR 701.3, stored copy';
const CANADA = 'Cosmetic Regulations, C.R.C., c. 869, as in force on 12 April 2026';
const AUSTRALIA = 'Consumer Goods (Cosmetics) Information Standard 2020 (F2020L01469)';
const ASEAN = 'ASEAN Cosmetic Directive, Appendix II';
const SWITZERLAND = 'Ordinance on cosmetics (VKos), SR 817.023.31';

/** What asks for the list of ingredients outside the EU; short texts in our own words, the official text prevails. */
const ROWS: readonly Row[] = [
	[
		'gb-1223-2009',
		'art-19-1-g',
		'Assimilated Reg. 1223/2009 (GB), Art. 19(1)(g)',
		'List of ingredients',
		'As in the EU: descending weight when added, below 1 % in any order behind, colourants last, nano in brackets. The allergens are those named before (EU) 2023/1545.',
		GB,
		'fromMemory'
	],
	[
		'gb-1223-2009',
		'art-33',
		'Assimilated Reg. 1223/2009 (GB), Art. 33',
		'Names of ingredients',
		'Common ingredient names of the glossary.',
		GB,
		'fromMemory'
	],
	[
		'us-21-cfr-701',
		's-3-f',
		'21 CFR 701.3(a), (f), (g)',
		'Order of the ingredient declaration',
		'Descending predominance; ingredients of not more than 1 % in any order behind the others; colour additives in any order and at any place; colours of some shades only behind the words for it.',
		US
	],
	[
		'us-21-cfr-701',
		's-3-c',
		'21 CFR 701.3(c)',
		'Names of ingredients',
		'Common or usual English names: water and fragrance in English, plants with their common name, colour additives under their listed names.',
		US
	],
	[
		'ca-crc-869',
		's-21-4',
		'Cosmetic Regulations (Canada), s. 21.4',
		'Order of the list, fragrance allergens',
		'Descending weight; 1 % or less and colouring agents in any order behind; parfum and aroma may stand at the end; fragrance allergens above 0.001 % in leave-on and 0.01 % in rinse-off products are named, by the EU’s table with dates of Canada’s own.',
		CANADA
	],
	[
		'ca-crc-869',
		's-21-2',
		'Cosmetic Regulations (Canada), s. 21.2',
		'Names of ingredients',
		'INCI names; the names of the schedule in one of three forms; plants at least by genus and species; the colours of a range behind one of the signs for it.',
		CANADA
	],
	[
		'au-information-standard-2020',
		's-7',
		'Cosmetics Information Standard 2020 (Australia), s. 7',
		'List of ingredients',
		'Descending mass or volume, or: 1 % or more descending, below 1 % in any order, colours in any order behind. English or INCI names.',
		AUSTRALIA
	],
	[
		'asean-directive',
		'appendix-ii',
		'ASEAN Cosmetic Directive, Appendix II',
		'List of ingredients',
		'Descending weight when added; below 1 % in any order behind; colours in any order behind the others; plants by genus and species.',
		ASEAN
	],
	[
		'ch-817-023-31',
		'art-8',
		'VKos (SR 817.023.31), Art. 8',
		'List of ingredients',
		'Descending share when placed on the market; below 1 % in any order behind; colours in any order behind the others; perfume and allergens as in the EU; nano in brackets; names of the EU’s glossary.',
		SWITZERLAND
	]
];

export const MARKET_ARTICLES: readonly RuleText[] = ROWS.map(
	([act, entry, citation, title, text, source, standing = 'confirmed']) => ({
		act,
		entry,
		citation,
		title,
		text,
		source,
		from: null,
		until: null,
		standing
	})
);
