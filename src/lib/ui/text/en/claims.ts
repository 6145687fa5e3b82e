export const claims = {
	title: 'Claims',
	sentence: (all: number, supported: number) =>
		all === 0 ? 'No claim yet.' : `${supported} of ${all} ${all === 1 ? 'claim is' : 'claims are'} supported.`,
	caption: 'Claims and what supports them',
	head: { wording: 'Wording', kind: 'Kind', criteria: 'Criteria', evidence: 'Evidence', state: 'State' },
	empty:
		'A claim belongs here word for word, as in “Moisturises for 24 hours”. Each of the six criteria gets a written answer, and evidence is linked.',
	add: 'Add a claim',
	wording: 'Wording, as it will be used',
	kind: 'Kind of claim',
	kinds: {
		composition: 'contains, composition',
		ingredientEfficacy: 'efficacy of an ingredient',
		hydration: 'moisturising, hydration',
		skin: 'effect on the skin',
		hair: 'effect on the hair',
		hygiene: 'odour, perspiration, cleansing',
		sunProtection: 'sun protection',
		perception: 'perceived by consumers',
		tested: 'tested under control',
		freeFrom: 'free from',
		natural: 'natural, organic',
		vegan: 'vegan, animal origin',
		comparative: 'comparative',
		other: 'other'
	} as Readonly<Record<string, string>>,
	state: { supported: 'supported', notYet: 'not yet', outOfDate: 'out of date' },
	answered: (count: number) => `${count} of 6`,
	evidenceCount: (count: number) => (count === 0 ? 'none' : `${count} ${count === 1 ? 'document' : 'documents'}`),
	opened: 'The six criteria',
	criterion: {
		legalCompliance: 'Legal compliance',
		truthfulness: 'Truthfulness',
		evidentialSupport: 'Evidential support',
		honesty: 'Honesty',
		fairness: 'Fairness',
		informedDecision: 'Informed decision'
	},
	hint: {
		legalCompliance: 'No approval by an authority implied; nothing sold as a benefit that the law demands anyway.',
		truthfulness: 'What is named is there on purpose; the product has the property, not only an ingredient.',
		evidentialSupport: 'Adequate, verifiable and relevant to this product.',
		honesty: 'Not beyond the evidence; conditions stated.',
		fairness: 'No denigration of competitors or of legal ingredients.',
		informedDecision: 'Clear to the person who will read it.'
	},
	answeredBy: (name: string, day: string) => `answered by ${name}, ${day}`,
	save: 'Save the answers',
	saved: 'Saved.',
	withdraw: 'Withdraw the claim',
	evidence: 'Evidence',
	link: 'Link a document of this product',
	choose: 'Choose a document',
	linkIt: 'Link',
	unlink: 'Take off',
	obtainedOn: (number: number | null) => (number === null ? 'no formula version' : `formula version ${number}`),
	noDocuments: 'No document is filed for this product yet. File it on the product file’s page or under Evidence.',
	fault: {
		wording: (length: number) => `The wording has ${length} characters; 1 to 500 are taken.`,
		answer: 'An answer has more than 4000 characters.'
	},
	marginText:
		'Six criteria of Regulation (EU) No 655/2013. A claim without six answers and evidence that fits this formula is “not yet”.'
};
