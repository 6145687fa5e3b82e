export const formulas = {
	title: 'Formulas',
	sentence: 'A formula stands alone; products refer to it.',
	find: 'Name or code',
	caption: 'Formulas',
	add: 'Add a formula',
	empty: 'A formula belongs here: lines of materials in % w/w that sum to exactly 100, one of them perhaps q.s.',
	nothingFound: 'No formula matches. Clear the search to see all.',
	head: { name: 'Formula', lines: 'lines', products: 'products', version: 'Version' },
	versionAndDraft: (released: number | null, draft: number | null) =>
		[released === null ? '' : `version ${released}`, draft === null ? '' : `draft ${draft}`].filter(Boolean).join(', '),
	newTitle: 'New formula',
	newSentence: 'Code and name first; the lines follow on its own sheet.',
	code: 'Code',
	codeHint: 'Capital letters, digits and hyphens, as in F-0012.',
	name: 'Name',
	create: 'Create the formula',
	faults: {
		code: (value: string) =>
			value ? `“${value}” cannot be a code: capital letters, digits and hyphens, at most 32.` : 'The code is missing.',
		name: 'The name is missing, or longer than 200 characters.'
	},
	version: (number: number) => `version ${number}`,
	draft: (number: number) => `draft ${number}`,
	releasedBy: (name: string, day: string) => `released ${day} by ${name}`,
	lines: (lines: number, phases: number) =>
		`${lines} ${lines === 1 ? 'line' : 'lines'} in ${phases} ${phases === 1 ? 'phase' : 'phases'}.`,
	edit: 'New version',
	save: 'Save the draft',
	saving: 'Saving …',
	saved: 'Saved.',
	notSaved: 'Not saved: the connection is gone. What you typed is kept on this machine.',
	restored: 'What you typed before is back; it is not saved yet.',
	release: (number: number) => `Release formula ${number}`,
	releaseReason: 'A released formula is saved and sums to exactly 100.',
	missing: (by: string) => `${by} % is missing`,
	tooMuch: (by: string) => `${by} % too much`,
	phase: (phase: string) => `Phase ${phase}`,
	batch: 'Batch size, g',
	batchNote: 'g for one batch. Exact decimals; nothing is rounded.',
	keys: 'Enter: next line. Arrow keys up and down: the line above or below. Paste a block from a spreadsheet into an amount.',
	grid: 'Lines of the formula',
	row: (number: number) => `Line ${number}`,
	columns: {
		no: 'No',
		material: 'Material',
		contains: 'Contains',
		phase: 'Phase',
		percent: '% w/w',
		least: 'least',
		most: 'most',
		qs: 'q.s.',
		change: 'change',
		grams: 'g',
		documents: 'Documents'
	},
	ranges: 'Ranges of adjusters',
	lineCount: (lines: number) => `${lines} ${lines === 1 ? 'line' : 'lines'}`,
	qsTo100: 'q.s. to 100',
	documented: (with_: number, all: number) => `${with_} of ${all}`,
	total: 'Total',
	titleDraft: 'draft',
	addLine: 'Add a material: type a name, code or INCI',
	noMatch: 'No released material matches.',
	removeLine: (name: string) => `Remove ${name}`,
	removed: (name: string) => `${name} removed.`,
	pasted: (rows: number) => `${rows} ${rows === 1 ? 'row' : 'rows'} pasted.`,
	notFound: (names: string) => `Not found, and left out: ${names}.`,
	fault: (why: string, value: string, limit: string | null): string => {
		switch (why) {
			case 'notANumber':
				return `“${value}” is no number.`;
			case 'grouping':
				return `“${value}” groups its digits; write one decimal sign only.`;
			case 'negative':
				return `“${value}” is negative; the least is 0.`;
			case 'tooManyDecimals':
				return `“${value}” has more than ${limit} decimals.`;
			case 'aboveMost':
				return `“${value}” is more than ${limit} %.`;
			case 'tooLong':
			case 'too_big':
				return `The figure is longer than ${limit} signs.`;
			case 'secondQs':
				return 'There is a q.s. line already; a formula has one.';
			case 'pinReasonMissing':
				return 'Write why this version is pinned.';
			case 'unknownVersion':
				return `Version ${value} of this bulk is not released.`;
			case 'rangeOnQs':
				return 'A q.s. line has no range of its own.';
			case 'unknownCode':
				return `There is no material with the code “${value}”.`;
			default:
				return `“${value}” cannot be taken.`;
		}
	},
	faultAt: (line: number, sentence: string) => `Line ${line}: ${sentence}`,
	blocked: {
		sumAbove100: (by: string | null) => `The lines are together ${by} % above 100.`,
		sumBelow100: (by: string | null) => `The lines are together ${by} % below 100.`,
		materialMissing: () => 'A material has no released version.',
		formulaMissing: () => 'A bulk has no released version.',
		cycle: (_by: string | null, path: readonly string[]) =>
			path.length > 0 ? `A bulk contains this formula: ${path.join(' in ')}.` : 'A bulk contains this formula.',
		rangeWithoutQs: () => 'A line with a range needs a q.s. line that gives way.',
		rangeUpsideDown: () => 'The amount of a line lies outside its range.',
		tooManyRanges: () => 'More than ten lines have a range.',
		noLines: () => 'There is no line yet.',
		severalQs: () => 'There is more than one q.s. line.',
		material: () => 'A material contradicts itself.'
	} as Readonly<Record<string, (by: string | null, path: readonly string[]) => string>>,
	conflict:
		'Somebody saved this draft in between. Lines that only one of you changed are joined; for the others choose.',
	unsettled: (lines: number) =>
		`${lines} ${lines === 1 ? 'line waits' : 'lines wait'} for your choice between both values; then it can be saved.`,
	signedOut: 'Not saved: you are signed out. What you typed is kept on this machine; sign in and come back.',
	pasteLost: 'Nothing was pasted: the connection is gone.',
	theirs: 'Theirs',
	yours: 'Yours',
	lineGone: 'line removed',
	marginTitle: 'What this draft does',
	marginReleased: 'What this version gives',
	changed: 'Composition, changed names',
	unchanged: (count: number) => `${count} ${count === 1 ? 'name' : 'names'} unchanged.`,
	noBefore: 'There is no released version to compare with.',
	list: (market: string) => `List of these lines for ${market}`,
	bulk: (number: number) => `bulk, version ${number}`,
	bulkTitle: 'Bulk',
	pinned: 'pinned',
	pinTo: (name: string) => `${name}, version that answers`,
	follows: (number: number) => `follows, now ${number}`,
	pinnedTo: (number: number) => `pinned to ${number}`,
	pinReason: (name: string) => `${name}, why it is pinned`,
	pinReasonHint: 'why pinned',
	least: (name: string) => `${name}, least, % w/w`,
	most: (name: string) => `${name}, most, % w/w`,
	listSame: 'The list prints the same names in the same order.',
	notWhole: 'Composition and list appear when the lines make a whole of 100.',
	weak: (count: number) => `${count} ${count === 1 ? 'place' : 'places'} in the order depend on a supplier’s range.`,
	leaveOn: 'Allergens are judged for a leave-on product; each product judges for itself.',
	variants: 'Formulas that take this one in',
	usedIn: 'Products that refer to it',
	usedInNone: 'No product refers to it yet.',
	versionsTitle: 'Versions'
};
