import type { DecimalFault } from '$lib/domain/quantity/decimal';
import type { MaterialFault } from '$lib/domain/material/types';

const roles = {
	ingredient: 'ingredient',
	carryOver: 'carry-over',
	impurity: 'impurity, not listed',
	processingAid: 'processing aid, not listed',
	ofWhich: 'of which'
};

const fieldNames: Readonly<Record<string, string>> = {
	inci: 'constituent',
	cas: 'CAS number',
	ec: 'EC number',
	min: 'min',
	typical: 'typical',
	max: 'max',
	page: 'page'
};

const figureFaults: Record<DecimalFault | 'openMinimum', (value: string, limit: string | null) => string> = {
	empty: () => 'The figure is missing.',
	notANumber: (value) => `“${value}” is no number.`,
	grouping: (value) => `“${value}” groups its digits; write one decimal sign only.`,
	negative: (value) => `“${value}” is negative; the least is 0.`,
	tooManyDecimals: (value, limit) => `“${value}” has more than ${limit} decimals.`,
	tooLong: (_value, limit) => `The figure is longer than ${limit} signs.`,
	aboveMost: (value, limit) => `“${value}” is more than ${limit} %.`,
	openMinimum: (value) => `“${value}”: a minimum cannot be “less than”.`
};

export const materials = {
	title: 'Materials',
	sentence: (all: number) =>
		all === 0
			? 'No material yet.'
			: 'Each with its composition as the supplier states it, and the document that says so.',
	find: 'Name, code, supplier, INCI, CAS',
	caption: 'Materials',
	add: 'Add a material',
	import: 'Import',
	supplier: 'Supplier',
	empty:
		'A raw material belongs here: its code, its supplier and what it contains, as in “Glycerin 99.5, Selby Oils: Glycerin 99.5 %, Aqua 0.5 %”.',
	nothingFound: 'No material matches. Clear the search to see all.',
	head: {
		material: 'Material',
		supplier: 'Supplier',
		contains: 'Contains',
		used: 'used in',
		documents: 'Documents',
		version: 'Version'
	},
	documented: (with_: number, all: number) => `${with_} of ${all}`,
	version: (number: number) => `version ${number}`,
	draft: (number: number) => `draft ${number}`,
	versionAndDraft: (released: number | null, draft: number | null) =>
		[released === null ? '' : `version ${released}`, draft === null ? '' : `draft ${draft}`].filter(Boolean).join(', '),
	newTitle: 'New material',
	newSentence: 'Code, trade name and supplier first; the composition follows on its own sheet.',
	code: 'Code',
	codeHint: 'Capital letters, digits and hyphens, as in GLY-995.',
	tradeName: 'Trade name',
	create: 'Create the material',
	faults: {
		code: (value: string) =>
			value ? `“${value}” cannot be a code: capital letters, digits and hyphens, at most 32.` : 'The code is missing.',
		tradeName: 'The trade name is missing, or longer than 200 characters.',
		supplier: 'The supplier is missing, or longer than 200 characters.'
	},
	releasedBy: (name: string, day: string) => `released ${day} by ${name}`,
	effectiveFrom: (day: string) => `effective from ${day}`,
	effectiveLabel: 'effective from',
	effectiveHint: 'The first batch day for which it answers; today without one.',
	effectiveFault: (day: string, limit: string) =>
		`${day} lies before ${limit}, from which the present version answers. Choose that day or a later one.`,
	from: (supplier: string) => `from ${supplier}`,
	edit: 'New version',
	save: 'Save the draft',
	saving: 'Saving …',
	saved: 'Saved.',
	notSaved: 'Not saved: the connection is gone. What you typed is kept on this machine.',
	signedOut: 'Not saved: you are signed out. What you typed is kept on this machine; sign in and come back.',
	restored: 'What you typed before is back; it is not saved yet.',
	release: 'Release',
	releaseReason: 'Save the draft first; then a composition without contradiction can be released.',
	constituents: 'Constituents',
	row: (number: number) => `Row ${number}`,
	columns: {
		constituent: 'Constituent',
		cas: 'CAS number',
		ec: 'EC number',
		casShort: 'CAS',
		ecShort: 'EC',
		numbers: 'CAS and EC number',
		roleAndUse: 'Role, function here',
		documentAndPage: 'Document, page',
		role: 'Role',
		declared: 'declared, %',
		narrowed: 'narrowed, %',
		typical: 'typical, %',
		min: 'min, %',
		max: 'max, %',
		use: 'Function here',
		nano: 'nano',
		origin: 'origin',
		parent: 'Part of',
		document: 'Document',
		page: 'Page',
		range: 'range'
	},
	roles,
	uses: {
		other: 'no special one',
		preservative: 'preservative',
		uvFilter: 'UV filter',
		colourant: 'colourant',
		hairDye: 'hair dye'
	},
	originUnknown: 'origin not stated',
	origins: {
		plant: 'plant',
		animal: 'animal',
		mineral: 'mineral',
		synthetic: 'synthetic',
		biotechnological: 'biotechnological',
		mixed: 'mixed'
	},
	room: (low: string, high: string) => `the others leave ${low} to ${high}`,
	noRoom: 'the others alone exceed 100',
	unknown: 'not in the glossary',
	nanoName: (inci: string) => `${inci} (nano)`,
	derived: 'derived',
	normalised: 'normalised',
	noDocument: 'no document',
	documentPage: (title: string, page: number | null) => (page === null ? title : `${title}, page ${page}`),
	choose: 'none',
	addRow: 'Add a constituent',
	removeRow: (name: string) => `Remove ${name || 'this row'}`,
	statementOf: (name: string) => `${name}, composition statement`,
	upload: 'Attach a document to this material',
	uploadHint: 'It can then be chosen for each constituent.',
	keys: 'Declared as the supplier says it; narrowed by the sum of 100.',
	settled: 'Nothing contradicts itself. This can be released.',
	noRows: 'No constituent yet. A material needs at least one.',
	fault: (fault: { readonly kind: MaterialFault['kind'] }, by: string | null, name: string): string => {
		switch (fault.kind) {
			case 'noConstituents':
				return 'No constituent yet.';
			case 'minimaAbove100':
				return `The least figures together are ${by} % above 100.`;
			case 'maximaBelow100':
				return `The highest figures together are ${by} % below 100.`;
			case 'typicalsOffBy':
				return `The typical figures miss 100 by ${by} %; at most 0.5 is evened out.`;
			case 'typicalOutsideRange':
				return `The typical figure of ${name} lies outside the range that the sum leaves.`;
			case 'rangeUpsideDown':
				return `The minimum of ${name} is above its maximum.`;
			case 'partsAboveParent':
				return `The parts of ${name} are together ${by} % above it.`;
			case 'parentUnknown':
				return `${name} is part of something that is not in this material.`;
		}
	},
	fieldFault: (field: string, why: string, value: string, limit: string | null): string => {
		if (why in figureFaults) return figureFaults[why as keyof typeof figureFaults](value, limit);
		if (why === 'checkDigit') return `“${value}” has a wrong check digit; ${limit} would be right.`;
		if (why === 'identifierShape')
			return field === 'ec'
				? `“${value}” is no EC number, as in 200-289-5.`
				: `“${value}” is no CAS number, as in 56-81-5.`;
		if (field === 'inci') return value ? 'The name is longer than 300 characters.' : 'The name is missing.';
		if (why === 'parentMissing') return 'Choose the constituent that it is part of.';
		return `“${value}” cannot be taken.`;
	},
	faultAt: (row: number, field: string, sentence: string) => `Row ${row}, ${fieldNames[field] ?? field}: ${sentence}`,
	conflict: 'Somebody saved this draft in between. Their figures stand beside yours; choose which to keep.',
	theirs: 'Saved by somebody else',
	keepMine: 'Keep mine',
	takeTheirs: 'Take theirs',
	usedIn: 'Where it is used',
	usedInNone: 'No formula weighs it yet.',
	formula: 'Formula',
	qs: 'q.s.',
	versionsTitle: 'Versions',
	documentsTitle: 'Documents',
	documentsNone: 'No document yet.',
	marginDraft: 'What stands between this draft and its release',
	marginView: 'How it is read',
	marginViewText:
		'Ranges are narrowed by the sum of 100 before anything is computed. Impurities and processing aids stand inside the 100 and are never listed. Parts of a constituent are shares of the material.',
	focusDocument: 'Document',
	effects: {
		title: 'What the release did',
		moved: (product: string, number: number | null) =>
			`${product}, copy ${number ?? 'in review'}: says something else, out of date`,
		untouched: (product: string, number: number | null) => `${product}, copy ${number ?? 'in review'}: untouched`,
		none: 'No label copy rests on it.'
	}
};
