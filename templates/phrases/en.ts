/**
 * Every fixed word and sentence of the printed documents, by code. A further language is a constant of type `Phrases`;
 * the compiler then names what is missing. The wording is our own; it documents and never decides.
 */
export const en = {
	shared: {
		caution: 'It documents; it does not replace the safety assessor’s judgement. An official text prevails.',
		pageOf: (page: number, pages: number) => `${page} of ${pages}`,
		formula: (code: string, version: number, basis: number) => `${code}, version ${version}, basis ${basis}`,
		formulaReleased: (formula: string, date: string) => `${formula}, released ${date}`,
		formulaDraft: (formula: string) => `${formula}, not released`,
		none: 'none'
	},
	batch: {
		title: (formula: string) => `Batch sheet, ${formula}`,
		formula: (code: string, version: number, released: boolean) =>
			`${code}, ${released ? 'version' : 'draft'} ${version}`,
		lead: (size: string, step: string) =>
			`Batch of ${size} g, weighed in steps of ${step} g. The q.s. line takes the rounding.`,
		phase: 'Phase',
		material: 'Material',
		planned: 'planned, g',
		weighed: 'weighed, g',
		lot: 'lot',
		within: (bulks: string) => `in ${bulks}`,
		corrected: (content: string) => `lot of ${content} % of the nominal content`,
		total: 'Total',
		signature: 'Weighed by, date: ____________________   Checked by, date: ____________________',
		caution: 'Weigh only from the released version. The method and the safety data sheets of the materials apply.'
	},
	copy: {
		title: (pack: string, market: string) => `${pack}, ${market}`,
		running: (product: string) => `Label copy, ${product}`,
		edition: (number: number) => `copy ${number}`,
		noEdition: 'no number yet',
		lead: (language: string, formula: string, names: number, madeOn: string) =>
			`${language}. ${formula}. List of ${names === 1 ? 'one name' : `${names} names`}. Made on ${madeOn}.`,
		language: 'English',
		element: 'Element',
		requiredBy: 'Required by',
		missing: 'Missing',
		ingredients: 'Ingredients',
		listNote: (names: number, requiredBy: string) =>
			`${names === 1 ? 'One name' : `${names} names`}, ${requiredBy}; the same in every language`,
		mayContain: 'May contain',
		undecidedNote: 'Underlined: the order of these names is not decided.',
		open: 'What keeps it a draft',
		openOutOfDate: 'Why it is out of date',
		standing: 'Standing of this copy',
		facts: {
			client: 'Client',
			number: 'Number',
			state: 'State',
			hash: 'SHA-256 of the text',
			formula: 'Formula',
			rules: 'Rules applied',
			inUse: 'In use from',
			compiledBy: 'Compiled by'
		},
		notFrozen: 'none; the text is not frozen yet',
		numberLater: 'given when the laboratory approves',
		batch: (batch: string) => `batch ${batch}`,
		approvals: 'Decisions',
		noApprovals: 'Nobody has decided yet.',
		decidedBy: { laboratory: 'For the laboratory', client: 'For the client' },
		decision: { approved: 'approved', sentBack: 'sent back' },
		states: {
			draft: 'draft',
			inReview: 'in review',
			sentBack: 'sent back',
			approvedByLaboratory: 'approved by the laboratory',
			approvedByClient: 'approved by the client',
			inUse: 'in use',
			superseded: 'superseded'
		},
		stateOutOfDate: (state: string) => `${state}, out of date`,
		marks: {
			draft: 'Draft, not for print',
			inReview: 'In review, not for print',
			sentBack: 'Sent back, not for print',
			awaitsClient: 'Awaits the client, not for print',
			superseded: 'Superseded, not for print',
			outOfDate: 'Out of date, not for print'
		},
		compareAfter: 'Compare with artwork only after approval.',
		compareNow: 'Compare the artwork with this text, character by character.',
		cautions: [
			'A mark on the pack, such as the e-mark, the open jar or the hourglass, is named here in words; artwork must carry the shape that the law fixes.',
			'The copy holds the words. Size of type, contrast and place on the pack are checked on the artwork.',
			'It documents; it does not replace the safety assessor’s judgement. An official text prevails.'
		],
		elements: {
			brand: 'Brand',
			name: 'Name',
			function: 'Function',
			nominalContent: 'Nominal content',
			directions: 'Directions',
			precautions: 'Precautions',
			durability: 'Durability',
			periodAfterOpening: 'Period after opening',
			storage: 'Storage',
			responsiblePerson: 'Responsible person',
			origin: 'Country of origin',
			batch: 'Batch'
		}
	},
	file: {
		kind: 'Product information file',
		running: (product: string) => `${product}, product information file`,
		runningTrial: (issue: number, date: string) => `issue ${issue}, trial of ${date}, not sealed`,
		runningSealed: (issue: number, date: string) => `issue ${issue}, sealed ${date}`,
		address: (name: string, address: string) => `${name}, ${address}`,
		facts: {
			responsiblePerson: 'Responsible person, EU',
			compiledBy: 'Compiled by',
			formula: 'Formula',
			rules: 'Rules applied',
			inUse: 'In use',
			kept: 'Kept'
		},
		noBatch: 'no batch placed on the market yet',
		issue: (number: number) => `Issue ${number}`,
		// The number follows the words: it is known only after the layout and is set at the end of the line.
		pages: 'English, pages: ',
		sealedOn: 'Sealed on',
		sealedBy: 'by',
		manifest: 'SHA-256',
		sealedNote: 'The hash is that of the manifest, which lists every bound document by its own.',
		trial: (date: string, open: string) => `Trial of ${date}. Not sealed: ${open}`,
		trialNothingOpen: 'nothing is open; it awaits the officer.',
		trialOpen: (numbers: readonly string[]) =>
			numbers.length === 1
				? `section ${numbers[0]} is not ready.`
				: `sections ${numbers.slice(0, -1).join(', ')} and ${numbers.at(-1)} are not ready.`,
		contents: 'Contents',
		contentsSection: 'Section',
		contentsLaw: 'Law',
		contentsOpen: 'Open in this trial',
		contentsPage: 'page',
		contentsNote: 'A sealed issue has no column “open”.',
		opening: (headings: number) => `${headings} headings. Each says what it needs, what it holds and what is missing.`,
		heading: 'Heading',
		standing: 'Standing',
		standingReady: 'ready',
		hashShort: 'SHA-256, first 8',
		headingsOpen: (open: number) => (open === 1 ? '1 heading open' : `${open} headings open`),
		evidenceCount: (count: number) => `Evidence, ${count === 1 ? '1 document' : `${count} documents`}`,
		need: 'What the section needs',
		needLaw: 'Law',
		needAnswer: 'Answer',
		needWords: 'Held by, or what is missing',
		answers: { held: 'held', missing: 'missing', outOfDate: 'out of date', notApplicable: 'not applicable' },
		readiness: {
			notBegun: 'Not begun. Nothing is recorded for this section.',
			incomplete: (missing: number) =>
				missing === 1
					? 'Incomplete. One item is missing or out of date.'
					: `Incomplete. ${missing} items are missing or out of date.`,
			ready: 'Ready. Everything that this section needs is held.',
			outOfDate: 'Out of date. It rests on something that has changed since.',
			beingRechecked: 'Being checked again after a change; nothing here is settled until that is done.'
		},
		openShort: {
			notBegun: 'not begun',
			incomplete: 'incomplete',
			ready: '',
			outOfDate: 'out of date',
			beingRechecked: 'being checked again'
		},
		sources: 'Sources',
		composition: {
			number: 'No',
			ingredient: 'Ingredient',
			cas: 'CAS',
			function: 'Function',
			share: '% w/w',
			range: 'range',
			from: 'from',
			sum: 'Sum',
			note: 'No range: the share is exact. “Of which” stands inside the row above it and is not added.'
		},
		noComposition:
			'No composition can be shown: the formula has no released version, or a material in it is contradictory.',
		claims: {
			title: (count: number) => (count === 1 ? 'One claim' : `${count} claims`),
			none: 'No claim with an effect is recorded for this product.',
			claim: 'Claim',
			criterion: 'Criterion of Regulation (EU) 655/2013',
			answer: 'Answer',
			usedOn: (places: string) => `Used on: ${places}`,
			evidence: 'Evidence',
			noEvidence: 'no document linked',
			unanswered: 'not answered yet',
			criteria: {
				legalCompliance: 'Legal compliance',
				truthfulness: 'Truthfulness',
				evidentialSupport: 'Evidential support',
				honesty: 'Honesty',
				fairness: 'Fairness',
				informedDecision: 'Informed decision-making'
			}
		},
		copies: {
			title: 'Label copy',
			law: 'Art. 19',
			copy: 'Pack and market',
			lead: (count: number) =>
				count === 1
					? 'One copy; it follows on pages of its own.'
					: `${count} copies; each follows on pages of its own.`,
			none: 'No label copy has been written for this product.'
		},
		evidence: {
			title: 'Evidence',
			law: 'Art. 11(2)',
			lead: 'The documents that the sections name. The hash is that of the file as it was received.',
			none: 'No document is linked.',
			document: 'Document',
			pages: 'pages',
			dated: 'Dated'
		},
		parts: { a: 'Safety report, Part A', b: 'Safety report, Part B' },
		partLaw: { a: 'Art. 11(2)(b), Annex I', b: 'Art. 10, Annex I' },
		partBNote: 'Part B is the assessor’s own. The file prints what was written and signed, and adds nothing to it.'
	},
	sections: {
		description: {
			title: 'Description of the product',
			law: 'Art. 11(2)(a)',
			purpose: 'What the product is, so that this file can be attributed to it and to no other.'
		},
		a1: {
			title: 'Quantitative and qualitative composition',
			law: 'Annex I, A 1',
			purpose: 'Every substance with its identity, function and share, and where each figure comes from.'
		},
		a2: {
			title: 'Physical and chemical characteristics, stability',
			law: 'Annex I, A 2',
			purpose: 'The specification of substances and product, and how the product keeps under foreseeable storage.'
		},
		a3: {
			title: 'Microbiological quality',
			law: 'Annex I, A 3',
			purpose: 'The limits for materials and product, and the challenge test of the preservation.'
		},
		a4: {
			title: 'Impurities, traces, packaging material',
			law: 'Annex I, A 4',
			purpose: 'Purity of the substances, traces that cannot be avoided, and what the pack is made of.'
		},
		a5: {
			title: 'Normal and reasonably foreseeable use',
			law: 'Annex I, A 5',
			purpose: 'How the product is meant to be used, and what else people may do with it.'
		},
		a6: {
			title: 'Exposure to the product',
			law: 'Annex I, A 6',
			purpose: 'Site, area, amount, duration, frequency, routes and the people exposed.'
		},
		a7: {
			title: 'Exposure to the substances',
			law: 'Annex I, A 7',
			purpose: 'The systemic dose of each substance that follows from heading 6.'
		},
		a8: {
			title: 'Toxicological profiles of the substances',
			law: 'Annex I, A 8',
			purpose: 'What is known of each substance, and the margin that follows.'
		},
		a9: {
			title: 'Undesirable effects and serious undesirable effects',
			law: 'Annex I, A 9',
			purpose: 'What users have reported of this product or of similar ones.'
		},
		a10: {
			title: 'Information on the product',
			law: 'Annex I, A 10',
			purpose: 'Other studies and assessments that bear on the product.'
		},
		b1: {
			title: 'Assessment conclusion',
			law: 'Annex I, B 1',
			purpose: 'The assessor’s statement on safety in relation to Article 3, for this formula.'
		},
		b2: {
			title: 'Labelled warnings and instructions of use',
			law: 'Annex I, B 2',
			purpose: 'Which warnings and directions the label must carry.'
		},
		b3: { title: 'Reasoning', law: 'Annex I, B 3', purpose: 'How the conclusion follows from Part A.' },
		b4: {
			title: 'Assessor’s credentials and approval of Part B',
			law: 'Annex I, B 4',
			purpose: 'Who signs, with which qualification, and when.'
		},
		method: {
			title: 'Method of manufacture',
			law: 'Art. 11(2)(c)',
			purpose: 'How the product is made, step by step, and what is checked on the way.'
		},
		practice: {
			title: 'Good manufacturing practice',
			law: 'Art. 8, 11(2)(c)',
			purpose: 'The statement that manufacture follows good practice, and what stands behind it.'
		},
		effect: {
			title: 'Proof of the effect claimed',
			law: 'Art. 11(2)(d)',
			purpose: 'Each claim, its answer to the six criteria and its evidence.'
		},
		animalTesting: {
			title: 'Animal testing',
			law: 'Art. 11(2)(e), 18',
			purpose: 'Tests by the manufacturer, its agents or suppliers, also those made for the law of other countries.'
		}
	}
};

/** The shape that every language must fill. */
export type Phrases = typeof en;
