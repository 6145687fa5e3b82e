export const rules = {
	title: 'Rule book',
	sentence: (count: number, name: string) => `${count} articles and entries, state ${name}.`,
	find: 'Article, name or words',
	caption: 'Articles and entries',
	head: { citation: 'Entry', title: 'Subject', standing: 'Standing' },
	nothingFound: 'No entry matches. Clear the search to see all.',
	standing: {
		confirmed: 'confirmed against its source',
		fromMemory: 'from memory; check the official text',
		commonPractice: 'common practice, no source'
	},
	source: 'Source',
	from: 'Applies to batches placed from',
	until: 'until',
	ownWords: 'In our own words. The official text prevails.',
	marginText:
		'Short texts in our own words, each with its source and standing. The official text prevails, and local law with it.'
};

export const auditTrail = {
	title: 'Audit row',
	sentence: 'Written in the transaction of the change it records; nobody can edit it.',
	who: 'Who',
	when: 'When',
	what: 'What',
	subject: 'Subject',
	reason: 'Reason',
	before: 'Before',
	after: 'After',
	hash: 'Hash of this row',
	previousHash: 'Hash of the row before',
	previous: 'Row before',
	next: 'Row after',
	none: 'none',
	system: 'the system',
	actions: {
		'version-released': 'a version was released',
		'draft-saved': 'a draft was saved',
		'draft-opened': 'a draft was opened',
		'material-created': 'a material was made',
		'formula-created': 'a formula was made',
		'product-created': 'a product was made',
		'details-saved': 'the product’s details were saved',
		'trial-recorded': 'a trial was recorded',
		'trial-continued': 'a draft went on from a trial',
		'list-arranged': 'the order of a list was set',
		'carry-over-decided': 'a carry-over was decided',
		'pack-added': 'a pack was added',
		'assessor-assigned': 'a safety assessor was assigned',
		'assessor-withdrawn': 'a safety assessor was withdrawn',
		'copy-begun': 'a label copy was begun',
		'copy-saved': 'the draft of a label copy was saved',
		'copy-submitted': 'a label copy was submitted for review',
		'copy-sent-back': 'a label copy was sent back',
		'copy-approved-by-laboratory': 'a label copy was approved by the laboratory',
		'copy-approved-by-client': 'a label copy was approved by the client',
		'copy-in-use': 'a label copy was put in use',
		'copy-superseded': 'a label copy was superseded',
		'claim-added': 'a claim was added',
		'claim-answered': 'the criteria of a claim were answered',
		'claim-withdrawn': 'a claim was withdrawn',
		'evidence-linked': 'evidence was linked to a claim',
		'evidence-unlinked': 'evidence was taken from a claim',
		'document-filed': 'a document was filed',
		'document-attached': 'a document was attached',
		'document-detached': 'a document was detached',
		'need-not-applicable': 'a need of the product file was set not applicable',
		'need-applicable': 'a need of the product file was set applicable again',
		'file-requested': 'a product file was requested',
		'file-built': 'a product file was built',
		'file-shared': 'a product file was shared with the client',
		'inputs-moved': 'a release reached this product',
		'person-added': 'a person was added',
		'link-mailed': 'a link to choose a password was mailed',
		'invitation-accepted': 'an invitation was accepted',
		'reset-asked': 'a new password was asked for',
		'password-reset': 'a password was set anew',
		'password-changed': 'a password was changed',
		'signed-out-everywhere': 'signed out everywhere',
		'client-added': 'a client was added',
		'signed-in': 'signed in',
		'signed-out': 'signed out',
		'token-issued': 'a token was issued',
		'preferences-changed': 'own settings were changed'
	} as Readonly<Record<string, string>>,
	marginText:
		'Each row carries the hash of the row before it, so that a change or a gap shows when the chain is verified.'
};

export const desk = {
	title: 'Desk',
	sentence: (count: number) =>
		count === 0 ? 'Nothing waits for you.' : `${count} ${count === 1 ? 'thing waits' : 'things wait'} for you.`,
	caption: 'What waits for you',
	head: { what: 'What', why: 'Why', since: 'since' },
	materialDraft: (name: string, number: number) => `${name}, draft ${number}`,
	formulaDraft: (name: string, number: number) => `${name}, draft ${number}`,
	waits: 'a draft to finish or release',
	copy: (product: string, number: number | null) =>
		number === null ? `${product}, label copy` : `${product}, label copy ${number}`,
	copyWaits: {
		draft: 'a draft to finish and submit',
		inReview: 'waits for the laboratory’s approval',
		approvedByClient: 'waits for its first batch',
		outOfDate: 'out of date: the list prints other names now'
	},
	empty: 'Drafts that you may finish and copies that wait for you stand here, each with a link to the place of work.',
	products: 'Products',
	noProducts: 'No product yet.',
	marginTitle: 'Begin here',
	steps: [
		'Add the materials with their composition and documents, and release them.',
		'Write the formula from them until it balances at 100, and release it.',
		'Make a product for a client; its list stands there at once, with every reason.'
	]
};
