import type { RuleText } from '../schemas/reference';

export type ArticleRow = readonly [
	entry: string,
	citation: string,
	title: string,
	text: string,
	standing?: RuleText['standing']
];

const COSMETICS = 'Regulation (EC) No 1223/2009';
const CLAIMS = 'Regulation (EU) No 655/2013';

/** Short texts in our own words; the official text prevails. */
const COSMETICS_ROWS: readonly ArticleRow[] = [
	[
		'art-2-1-a',
		'Art. 2(1)(a)',
		'Cosmetic product',
		'A substance or mixture for the outside of the body, the teeth or the mouth, meant only or mainly to clean, perfume, change the appearance, protect, keep in good condition or correct odours.',
		'fromMemory'
	],
	[
		'art-3',
		'Art. 3',
		'Safety',
		'A product made available must be safe for people under normal or reasonably foreseeable use; presentation, labelling and instructions count.'
	],
	[
		'art-4',
		'Art. 4',
		'Responsible person',
		'Only products with a responsible person established in the Union may be placed on the market.'
	],
	[
		'art-8',
		'Art. 8',
		'Good manufacturing practice',
		'Manufacture follows good manufacturing practice; following the harmonised standard gives a presumption of it.'
	],
	[
		'art-10',
		'Art. 10',
		'Safety assessment',
		'Before placing, a qualified person assesses safety and a safety report by Annex I is drawn up and kept up to date.'
	],
	[
		'art-11',
		'Art. 11',
		'Product information file',
		'A file is kept for ten years after the last batch was placed: description, safety report, method of manufacture and statement of good practice, proof of the effect claimed, data on animal testing.'
	],
	[
		'art-11-2-a',
		'Art. 11(2)(a)',
		'Description of the product',
		'The description lets the file be attributed to the product without doubt.'
	],
	['art-11-2-b', 'Art. 11(2)(b)', 'Safety report in the file', 'The safety report of Art. 10(1) is part of the file.'],
	[
		'art-11-2-c',
		'Art. 11(2)(c)',
		'Method of manufacture',
		'The file describes the method of manufacture and states that good manufacturing practice is followed.'
	],
	[
		'art-11-2-d',
		'Art. 11(2)(d)',
		'Proof of effect',
		'Where the nature or the effect of the product justifies it, the file proves the effect claimed.'
	],
	[
		'art-11-2-e',
		'Art. 11(2)(e)',
		'Animal testing',
		'The file holds data on animal testing by the manufacturer, agents or suppliers, also for the law of other countries.'
	],
	[
		'art-13',
		'Art. 13',
		'Notification',
		'Before placing, the product is notified with category, names, responsible person, contact, and the particulars that the article lists.'
	],
	[
		'art-16',
		'Art. 16',
		'Nanomaterials',
		'Products with nanomaterials other than those permitted as colourants, UV filters or preservatives or meeting Annex III are notified six months before placing.'
	],
	[
		'art-17',
		'Art. 17',
		'Traces of prohibited substances',
		'Small traces that cannot be avoided technically under good practice are permitted when the product stays safe.'
	],
	[
		'art-19-1-a',
		'Art. 19(1)(a)',
		'Responsible person on the label',
		'Name and address of the responsible person; of several addresses the one with the file is highlighted. Imported products name their country of origin.'
	],
	[
		'art-19-1-b',
		'Art. 19(1)(b)',
		'Nominal content',
		'Content at the time of packaging by weight or volume. Not needed under 5 g or 5 ml, for free samples and single-application packs.'
	],
	[
		'art-19-1-c',
		'Art. 19(1)(c)',
		'Durability',
		'A date of minimum durability; above thirty months the period after opening instead, except where durability after opening is not relevant.'
	],
	[
		'art-19-1-d',
		'Art. 19(1)(d)',
		'Precautions',
		'Particular precautions in use, at least those of Annexes III to VI, and those for professional use.'
	],
	[
		'art-19-1-e',
		'Art. 19(1)(e)',
		'Batch',
		'Batch number or reference by which the product can be identified; on the packaging alone where the product is too small.'
	],
	['art-19-1-f', 'Art. 19(1)(f)', 'Function', 'The function of the product unless its presentation makes it clear.'],
	[
		'art-19-1-g',
		'Art. 19(1)(g)',
		'List of ingredients',
		'Headed “ingredients”, in descending order of weight at the time they are added. Below 1 % any order after the others; colourants may follow in any order; perfume and aroma by that word with the listed allergens beside it; nanomaterials with “(nano)”. Impurities and technical aids that are not left in the product are no ingredients. Exactly 1 % is ordered: house reading of an open point.'
	],
	[
		'art-19-2',
		'Art. 19(2)',
		'Where it does not fit',
		'Precautions and list may stand on an enclosed or attached leaflet, label, tape, tag or card, to which the pack refers.'
	],
	[
		'art-19-5',
		'Art. 19(5)',
		'Language',
		'The Member State of the end user decides the language of content, durability, precautions and function.'
	],
	[
		'art-19-6',
		'Art. 19(6)',
		'Names in the list',
		'The list uses the common ingredient name of the glossary, else a generally accepted name.'
	],
	[
		'art-20',
		'Art. 20',
		'Claims',
		'Texts, names, pictures and signs must not imply characteristics or functions that the product does not have.'
	],
	[
		'art-21',
		'Art. 21',
		'Access for the public',
		'The composition, quantities of hazardous substances only, perfume by name, code and supplier, and data on undesirable effects are easily accessible to the public.'
	],
	[
		'art-23',
		'Art. 23',
		'Serious undesirable effects',
		'Serious undesirable effects are notified to the authority without delay, with the corrective measures taken.'
	],
	[
		'art-33',
		'Art. 33',
		'Glossary of ingredient names',
		'The Commission keeps a glossary of common ingredient names; its names apply at the latest twelve months after publication. Present glossary: Implementing Decision (EU) 2025/1175.'
	],
	[
		'annex-i-a-1',
		'Annex I, A 1',
		'Composition',
		'Qualitative and quantitative composition with chemical name, INCI, CAS, EC and intended function; perfume by name, code number and supplier.'
	],
	[
		'annex-i-a-2',
		'Annex I, A 2',
		'Physical and chemical characteristics, stability',
		'Characteristics of substances and product, and stability under reasonably foreseeable storage.'
	],
	[
		'annex-i-a-3',
		'Annex I, A 3',
		'Microbiological quality',
		'Microbiological specifications of substances and product and the result of the preservation challenge test.'
	],
	[
		'annex-i-a-4',
		'Annex I, A 4',
		'Impurities, traces, packaging',
		'Purity of substances, proof that traces of prohibited substances are technically unavoidable, characteristics of packaging.'
	],
	[
		'annex-i-a-5',
		'Annex I, A 5',
		'Normal and foreseeable use',
		'Normal and reasonably foreseeable use, reasoned with the warnings and instructions on the label.'
	],
	[
		'annex-i-a-6',
		'Annex I, A 6',
		'Exposure to the product',
		'Sites, area, amount, duration and frequency, routes and the people exposed.'
	],
	[
		'annex-i-a-7',
		'Annex I, A 7',
		'Exposure to the substances',
		'Exposure to the substances from the exposure to the product and their concentration.'
	],
	[
		'annex-i-a-8',
		'Annex I, A 8',
		'Toxicological profile',
		'Profile of each substance for all relevant end points, with sources, and the margin of safety.'
	],
	[
		'annex-i-a-9',
		'Annex I, A 9',
		'Undesirable effects',
		'All available data on undesirable and serious undesirable effects of the product.'
	],
	[
		'annex-i-a-10',
		'Annex I, A 10',
		'Information on the product',
		'Other relevant information, such as studies with volunteers and findings of other assessments.'
	],
	[
		'annex-i-b-1',
		'Annex I, B 1',
		'Assessment conclusion',
		'A statement on the safety of the product in relation to Art. 3.'
	],
	[
		'annex-i-b-2',
		'Annex I, B 2',
		'Warnings and instructions',
		'Whether particular warnings and instructions must stand on the label.'
	],
	[
		'annex-i-b-3',
		'Annex I, B 3',
		'Reasoning',
		'The reasoning from the data to the conclusion, with its own assessment for children under three and for external intimate hygiene.'
	],
	[
		'annex-i-b-4',
		'Annex I, B 4',
		'Assessor and approval',
		'Name, address and proof of qualification of the assessor, date and signature.'
	],
	[
		'annexes-ii-vi-preamble',
		'Preamble to Annexes II to VI',
		'Terms of the annexes',
		'Rinse-off products are removed after application, leave-on products stay in contact; kinds of product, parts of the body and professional use are defined. Entries of Annexes III to VI do not cover nano forms unless they say so.'
	],
	[
		'annex-vii',
		'Annex VII',
		'Symbols',
		'Hand in book: enclosed or attached information. Open jar: period after opening. Hourglass: date of minimum durability.'
	]
];

const CLAIM_ROWS: readonly ArticleRow[] = [
	[
		'criterion-1',
		'Annex, 1',
		'Legal compliance',
		'No claim that an authority approved the product, none that sells a legal minimum as a benefit; the average end user’s understanding counts.'
	],
	[
		'criterion-2',
		'Annex, 2',
		'Truthfulness',
		'What is claimed to be present is there on purpose; a property of an ingredient is not one of the product; opinions are no verified facts.'
	],
	[
		'criterion-3',
		'Annex, 3',
		'Evidential support',
		'Adequate and verifiable evidence, by the state of the art, relevant to the product and as strong as the claim.'
	],
	[
		'criterion-4',
		'Annex, 4',
		'Honesty',
		'The presentation does not go beyond the evidence and states the conditions under which it holds.'
	],
	[
		'criterion-5',
		'Annex, 5',
		'Fairness',
		'No denigration of competitors or of ingredients that are used legally; no confusion with another product.'
	],
	[
		'criterion-6',
		'Annex, 6',
		'Informed decision',
		'Clear and understandable for the user it is meant for, so that a choice can be made.'
	]
];

/** Rows of one act as rule texts; `short` stands before each citation. */
export const articleOf =
	(act: string, short: string, source: string) =>
	([entry, citation, title, text, standing = 'confirmed']: ArticleRow): RuleText => ({
		act,
		entry,
		citation: `${short}, ${citation}`,
		title,
		text,
		source,
		from: null,
		until: null,
		standing
	});

export const ARTICLES: readonly RuleText[] = [
	...COSMETICS_ROWS.map(articleOf('eu-1223-2009', 'Reg. (EC) 1223/2009', `${COSMETICS}, consolidated text`)),
	...CLAIM_ROWS.map(articleOf('eu-655-2013', 'Reg. (EU) 655/2013', `${CLAIMS}, applies since 11 July 2013`))
];
