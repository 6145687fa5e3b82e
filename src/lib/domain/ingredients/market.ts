import type { Market } from './types';

/** How one market reads a composition into a list; what the markets differ in, and nothing else. */
export interface MarketRule {
	/** Names of at least 1 % are ordered by weight (EU and its kin), or only those of more than 1 % (US, Canada). */
	readonly ordered: 'fromOnePercent' | 'aboveOnePercent';
	/** Where colourants may stand: behind all others, behind the ordered names, or anywhere. */
	readonly colourants: 'last' | 'afterOrdered' | 'anywhere';
	/** Parfum and Aroma by weight, or behind the other names (Canada allows it at any share). */
	readonly perfume: 'byWeight' | 'last';
	/** "(nano)" behind the name of a nanomaterial. */
	readonly nano: boolean;
	readonly names: 'glossary' | 'unitedStates' | 'canada';
	/** How colourants that only some shades hold are marked. */
	readonly shades: { readonly opens: string; readonly closes: string };
	/** What asks for the list and its order, and what for the names; ids of the rule reference. */
	readonly orderRule: string;
	readonly nameRule: string;
}

const EU: MarketRule = {
	ordered: 'fromOnePercent',
	colourants: 'last',
	perfume: 'byWeight',
	nano: true,
	names: 'glossary',
	shades: { opens: ', [+/- ', closes: ']' },
	orderRule: 'eu-1223-2009/art-19-1-g',
	nameRule: 'eu-1223-2009/art-33'
};

/**
 * The seven markets. Exactly 1.00 % is ordered where the text says "less than 1 %" and free where it says "not more than 1 %".
 * Sources: Regulation (EC) 1223/2009, Art. 19(1)(g); its assimilated text for Great Britain; 21 CFR 701.3; Cosmetic Regulations
 * (Canada), s. 21.1–21.4; Consumer Goods (Cosmetics) Information Standard 2020 (Australia), s. 7; ASEAN Cosmetic Directive,
 * Appendix II; VKos (SR 817.023.31), Art. 8.
 */
export const MARKET_RULES: Readonly<Record<Market, MarketRule>> = {
	EU,
	GB: { ...EU, orderRule: 'gb-1223-2009/art-19-1-g', nameRule: 'gb-1223-2009/art-33' },
	US: {
		ordered: 'aboveOnePercent',
		colourants: 'anywhere',
		perfume: 'byWeight',
		nano: false,
		names: 'unitedStates',
		shades: { opens: '. May contain: ', closes: '' },
		orderRule: 'us-21-cfr-701/s-3-f',
		nameRule: 'us-21-cfr-701/s-3-c'
	},
	CA: {
		ordered: 'aboveOnePercent',
		colourants: 'afterOrdered',
		perfume: 'last',
		nano: false,
		names: 'canada',
		shades: { opens: ', may contain/peut contenir: ', closes: '' },
		orderRule: 'ca-crc-869/s-21-4',
		nameRule: 'ca-crc-869/s-21-2'
	},
	AU: {
		...EU,
		nano: false,
		orderRule: 'au-information-standard-2020/s-7',
		nameRule: 'au-information-standard-2020/s-7'
	},
	ASEAN: { ...EU, nano: false, orderRule: 'asean-directive/appendix-ii', nameRule: 'asean-directive/appendix-ii' },
	CH: { ...EU, orderRule: 'ch-817-023-31/art-8', nameRule: 'ch-817-023-31/art-8' }
};
