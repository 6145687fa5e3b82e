export const products = {
	title: 'Products',
	sentence: 'A product belongs to a client and refers to a formula.',
	find: 'Product, brand or client',
	caption: 'Products',
	add: 'Add a product',
	empty: 'A product belongs here: whose it is, which formula it refers to, its pack and who is responsible for it.',
	nothingFound: 'No product matches. Clear the search to see all.',
	head: { product: 'Product', client: 'Client', formula: 'Formula', stay: 'Use' },
	stays: { 'leave-on': 'leave-on', 'rinse-off': 'rinse-off' },
	newTitle: 'New product',
	newSentence: 'For the EU. The label copy takes name, function, content and address from here.',
	create: 'Create the product',
	fields: {
		clientId: 'Client',
		name: 'Name',
		brandName: 'Brand name',
		functionText: 'Function, as it may stand on the pack',
		productType: 'Product type',
		stay: 'Use',
		formulaCode: 'Formula',
		clientCode: 'The client’s own code',
		responsibleName: 'Responsible person in the EU',
		responsibleAddress: 'Address at which the file is kept',
		originCountry: 'Country of origin, when imported',
		packName: 'Pack',
		packSize: 'Content',
		packUnit: 'Unit',
		packGtin: 'GTIN'
	},
	choose: 'Choose',
	faults: {
		missing: (field: string) => `${field}: this is missing or too long.`,
		amount: (value: string) => `“${value}” is no amount; write a number with at most three decimals.`,
		gtin: (value: string, right: string | undefined) =>
			right === undefined
				? `“${value}” is no GTIN; it has 8, 12, 13 or 14 digits.`
				: `“${value}” has a wrong check digit; ${right} would be right.`
	}
};

const markets = {
	EU: 'the EU',
	GB: 'the UK (GB)',
	US: 'the United States',
	CA: 'Canada',
	AU: 'Australia',
	ASEAN: 'ASEAN',
	CH: 'Switzerland'
} as const;

const leftOut = {
	impurity: () => 'an impurity is no ingredient',
	processingAid: () => 'a technical aid that is not left in the product is no ingredient',
	carryOver: () => 'carried over, and justified to have no function in the product',
	allergenAtOrBelow: (limit: string | null) => `stays at or below ${limit} % and is not named`,
	allergenNotYet: () => 'need not be named for a batch of this day',
	namedByPerfume: () => 'part of a constituent that is named'
};

export const list = {
	title: 'Ingredient list',
	markets,
	marketShort: { EU: 'EU', GB: 'UK (GB)', US: 'US', CA: 'Canada', AU: 'Australia', ASEAN: 'ASEAN', CH: 'Switzerland' },
	market: 'Market',
	sentence: (names: number, market: string, weak: number) =>
		weak === 0
			? `${names} names for ${market}. Every place is certain.`
			: `${names} names for ${market}. The order of ${weak} ${weak === 1 ? 'pair' : 'pairs'} depends on a supplier’s range, so the list cannot be approved.`,
	running: (formula: string, number: number, day: string, ruleBook: string) =>
		`${formula}, version ${number}, released ${day} · rule book ${ruleBook}`,
	nothingReleased: 'The formula has no released version yet. Release one, and the list stands here.',
	faults: 'The formula or a material contradicts itself, so no list can be made. The composition page names what.',
	batchDay: 'Batch placed on',
	judge: 'Judge this day',
	caption: 'Names in the order of the EU list',
	head: { no: 'No', name: 'Name as printed', from: 'From', percent: '% w/w', range: 'range, %', place: 'place, rule' },
	from: (count: number) => `${count} materials`,
	place: {
		certain: 'certain',
		restsOnTypical: 'rests on typical',
		undecided: 'undecided',
		free: '',
		colourant: 'colourant'
	},
	allergen: 'allergen',
	belowOne: (atOrBelow: boolean) =>
		atOrBelow ? 'At or below 1 %: any order is lawful.' : 'Below 1 %: any order is lawful.',
	printed: 'As it will be printed',
	copy: 'Copy text',
	copied: 'Copied.',
	ingredients: 'Ingredients:',
	leftOutTitle: 'What is not printed, and why',
	leftOut: (name: string, percent: string, reason: keyof typeof leftOut, limit: string | null) =>
		`${name}, ${percent} %: ${leftOut[reason](limit)}.`,
	weakTitle: 'Places that depend on a range',
	weak: (before: string, after: string) => `${before} before ${after}`,
	turns: (inci: string, percent: string, material: string) => `turns at ${percent} % ${inci} in ${material}`,
	questionsTitle: 'Cannot be told yet',
	question: (name: string, low: string, high: string, limit: string) =>
		`${name}: ${low} to ${high} % lies on both sides of ${limit} %.`,
	colourQuestion: (name: string, candidates: readonly string[]) =>
		candidates.length > 0
			? `${name}: the salt decides between ${candidates.join(' and ')}; write it into the constituent’s name, as in “CI 45410 (Na)”.`
			: `${name}: this market lists no such colour in this rule book.`,
	arrange: {
		start: 'Arrange',
		reset: 'Usual order',
		how: 'Drag a name, or use its arrows. A move that a supplier’s range could make unlawful is refused.',
		up: (name: string) => `Move ${name} up`,
		down: (name: string) => `Move ${name} down`,
		refused: (name: string, before: string) => `${name} cannot stand before ${before}.`,
		dropped: (name: string, before: string) => `The arrangement put ${name} before ${before}; this was dropped.`,
		turns: (inci: string, percent: string, material: string) =>
			`At ${percent} % ${inci} in ${material} that order would be unlawful.`,
		because: {
			weight: 'The second weighs more, in the part that is ordered by weight.',
			colourantLast: 'Colourants stand behind.',
			mayContainLast: 'What only some shades hold stands behind everything.'
		},
		failed: 'The order was not saved. Try again.'
	},
	carryOver: {
		leaveOut: (material: string) => `Carried over by ${material}: leave it out`,
		reason: 'Why it has no function in the finished product',
		hint: 'Kept with your name; the substance stays in every rule and safety reading.',
		confirm: 'Leave it out of the list'
	},
	downloads: { text: 'Text', json: 'JSON' },
	caution: 'It computes and documents. The qualified assessor and the official text prevail.',
	marginTitle: 'Why each name stands where it does',
	marginHint: 'Choose a line with the pointer or the arrow keys; its reasons stand here.',
	placeOf: (no: number, all: number) => `No ${no} of ${all}`,
	nth: (no: number, market: string) => `Name ${no} of the list for ${market}`,
	trail: {
		printed: 'Printed line',
		weighed: 'Weighed',
		together: 'Together',
		working: (weight: string, part: string) => `${weight} × ${part} %`,
		derived: 'A typical value is derived: the supplier states none.',
		normalised: 'A typical value is evened out to 100.',
		document: 'Document',
		noDocument: (material: string) => `${material}: no document attached`,
		documentPage: (title: string, page: number | null) => (page === null ? title : `${title}, page ${page}`),
		material: 'Material version',
		materialVersion: (name: string, number: number) => `${name}, version ${number}`,
		rule: 'Rule',
		decision: 'Decision',
		released: (number: number) => `Formula version ${number} released`,
		noDecision: 'none yet'
	}
};

export const composition = {
	title: 'Composition',
	sentence: (rows: number) => `${rows} substances as added, impurities among them.`,
	caption: 'Substances, heaviest first',
	head: { name: 'Substance', cas: 'CAS number', roles: 'Role', percent: '% w/w', range: 'range, %', from: 'From' },
	roles: {
		ingredient: 'ingredient',
		carryOver: 'carry-over',
		impurity: 'impurity',
		processingAid: 'processing aid',
		ofWhich: 'of which'
	} as Readonly<Record<string, string>>,
	fault: (kind: string, material: string | null) => (material === null ? kind : `${material}: ${kind}`),
	nano: (name: string) => `${name} (nano)`,
	marginText: 'As added: what was weighed, before anything is lost or reacts.'
};

export const productFormula = {
	title: 'Formula',
	sentence: 'Which released versions answer for this product.',
	version: (number: number, day: string) => `version ${number}, released ${day}`,
	basis: 'Basis',
	caption: 'Materials and the versions that answer',
	head: { material: 'Material', supplier: 'Supplier', version: 'Version' },
	marginText:
		'The newest released version effective on the batch day answers, so that a print can always be made again.'
};
