export const file = {
	title: 'Product file',
	sentence: (ready: number, all: number, open: number) =>
		`${ready} of ${all} sections are ready. ${open === 0 ? 'Nothing is open.' : `${open} ${open === 1 ? 'item is' : 'items are'} open.`}`,
	build: 'Build the PDF',
	building: 'Building the product file',
	caption: 'Sections of the file',
	head: { section: 'Section', state: 'State', needs: 'What it holds, or what is missing' },
	states: {
		notBegun: 'not begun',
		incomplete: 'incomplete',
		ready: 'ready',
		outOfDate: 'out of date',
		beingRechecked: 'being re-checked'
	},
	needState: { present: 'held', missing: 'missing', outOfDate: 'out of date', notApplicable: 'not applicable' },
	evidence: 'Evidence',
	evidenceCaption: 'Documents that count, with their hashes',
	evidenceHead: { title: 'Document', hash: 'SHA-256, first 8', pages: 'pages', dated: 'dated' },
	cannotBeBound: 'kept, cannot be bound',
	noEvidence: 'No document counts yet.',
	files: 'Files built',
	filesCaption: 'Product files that were built',
	filesHead: {
		number: 'Number',
		date: 'requested',
		by: 'by',
		pages: 'pages',
		hash: 'SHA-256, first 8',
		open: 'open',
		act: 'Download'
	},
	fileNumber: (number: number) => `File ${number}`,
	notBuilt: 'being built',
	shared: 'shared with the client',
	share: 'Share',
	shareWhy: 'Why the client may download it',
	noFiles: 'No file has been built yet.',
	supply: {
		releasedFormula: 'Open the formula',
		approvedCopy: 'Open the label',
		supportedClaims: 'Open the claims',
		everyMaterial: 'Open the materials',
		productDocument: 'File the document'
	},
	attach: (item: string) => `File: ${item}`,
	attachHint: 'Dated and kept by its content; it counts for the formula version that answers today.',
	notApplicable: 'Not applicable',
	applicable: 'Applicable again',
	reason: 'Reason, printed in the file',
	reasonMissing: 'Give the reason; it is printed in the file.',
	decidedBy: (name: string, day: string) => `decided by ${name}, ${day}`,
	marginTitle: 'What stands between this file and ready',
	marginText:
		'Readiness is computed from what is filed, approved and released; nobody ticks it. Choose a section to supply what it lacks.',
	caution: 'It documents; it does not replace the safety assessor’s judgement. An official text prevails.'
};
