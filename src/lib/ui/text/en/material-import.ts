import type { ImportColumn, ImportFault } from '$lib/schemas/material-import';
import { materials } from './materials';

const columns: Record<ImportColumn, string> = {
	material_code: 'The code of the material. A row without one goes on with the material above it.',
	trade_name: 'Needed once for each new material.',
	supplier: 'Needed once for each new material.',
	constituent: 'The INCI name; one row is one constituent.',
	cas: 'CAS number, as in 56-81-5.',
	ec: 'EC number, as in 200-289-5.',
	min: 'Least share in % of the material, with a comma or a point.',
	typical: 'Typical share. Alone it is an exact figure; “< 0.1” is a bound.',
	max: 'Highest share. Without any figure the constituent is the balance.',
	role: 'ingredient, carry-over, impurity, processing aid, of which. Empty is ingredient.',
	part_of: 'For a part of another constituent: that constituent’s name.',
	function: 'preservative, UV filter, colourant, hair dye. Empty is none of these.',
	nano: 'yes or no. Empty is no.',
	origin: 'plant, animal, mineral, synthetic, biotechnological, mixed. Empty is not stated.',
	document: 'The title of a document that is filed as evidence. Empty is this sheet.',
	page: 'The page of the document.'
};

const said: Record<string, (value: string, limit: string | null) => string> = {
	missing: () => 'missing.',
	codeMissing: () => 'the code is missing, and no row above gives one.',
	codeShape: (value) => `“${value}” cannot be a code: capital letters, digits and hyphens, at most 32.`,
	draftOpen: (value, limit) => `draft ${limit} of ${value} is open; release or finish it first.`,
	tooManyConstituents: (value, limit) => `${value} constituents; at most ${limit} fit into a material.`,
	tooLongName: (value, limit) => `“${value.slice(0, 40)} …” is longer than ${limit ?? 300} characters.`,
	differsFromKnown: (value, limit) => `“${value}” is not what stands here: ${limit}.`,
	differsFromFirst: (value, limit) => `“${value}” is not what the rows of this material say first: ${limit}.`,
	wordUnknown: (value, limit) => `“${value}” is none of: ${limit}.`,
	parentMissing: () => 'name the constituent that it is part of.',
	parentUnknown: (value) => `no constituent “${value}” stands in this material.`,
	partWithoutRole: (value) => `it is part of “${value}”, but its role is not “of which”.`,
	documentUnknown: (value) => `no document is filed under “${value}”.`,
	documentTwice: (value, limit) => `${limit} documents are filed under “${value}”; the title must be one of its own.`,
	noPage: (value, limit) => `“${value}” is no page from 1 to ${limit}.`,
	errorValue: (value) => `the sheet shows an error, ${value || 'of a formula'}.`,
	notComputed: () => 'the formula has no value; let the spreadsheet compute it and save again.',
	becameDate: (value) =>
		`the spreadsheet has turned it into a day (${value}); format the column as text and type it again.`,
	tooLong: () => 'longer than 2,000 characters.'
};

const sentence = ({ field, why, value, limit }: ImportFault): string => {
	if (field === 'material') {
		const together = materials.fault({ kind: why as Parameters<typeof materials.fault>[0]['kind'] }, limit, 'this row');
		return why === 'tooManyConstituents' ? (said[why]?.(value, limit) ?? why) : together;
	}
	const own = said[why]?.(value, limit);
	return own ?? materials.fieldFault(field === 'constituent' ? 'inci' : field, why, value, limit);
};

const head = (column: ImportColumn) => column.replaceAll('_', ' ');

export const materialImport = {
	title: 'Import of materials',
	sentence: 'From a CSV text or an XLSX workbook. Nothing is made before every row is in order.',
	choose: 'Choose the sheet',
	chooseHint:
		'Its first visible sheet is read: at most 20,000 rows and 25 MiB. The file is filed as evidence and cited by what it brings.',
	documentTitle: (file: string) => `Composition sheet ${file}`,
	templateCsv: 'Template as CSV',
	templateXlsx: 'Template as XLSX',
	columnsTitle: 'The columns',
	columnsHint:
		'The first row names them, in any order; capitals and spaces do not matter. Other columns are left aside. Formulas count by the value they show, a share formatted as “5 %” is 5, merged cells stand for each of their rows.',
	column: 'Column',
	meaning: 'What it holds',
	columns,
	head,
	earlier: 'Imports so far',
	none: 'No import yet.',
	file: 'Sheet',
	by: 'Begun',
	state: 'State',
	rows: 'rows',
	faulty: 'faulty rows',
	states: {
		reading: 'being read',
		unreadable: 'cannot be read',
		judged: 'waits for you',
		committing: 'being made',
		committed: 'made',
		discarded: 'given up'
	},
	reading: 'Reading the sheet',
	making: 'Making the materials',
	unreadable: (problem: Readonly<Record<string, unknown>>): string => {
		const listed = Array.isArray(problem['columns']) ? problem['columns'].join(', ') : '';
		switch (problem['kind']) {
			case 'columnsMissing':
				return `The first row lacks the column ${listed}. Take the template and copy your figures into it.`;
			case 'columnTwice':
				return `The first row names ${listed} twice. Keep one.`;
			case 'encrypted':
				return 'The workbook has a password or is of the old binary kind. Save it as XLSX without a password.';
			case 'tooLarge':
				return 'The file is larger than 25 MiB. Divide it.';
			case 'unpacksTooLarge':
				return 'The workbook unpacks to more than 100 MiB. Save only the sheet with the materials.';
			case 'tooManyRows':
				return `The sheet has more than ${String(problem['limit'])} rows. Divide it.`;
			case 'tooManyColumns':
				return `The sheet has more than ${String(problem['limit'])} columns. Keep those of the template.`;
			case 'empty':
				return 'The sheet holds no row below its head.';
			default:
				return 'This is neither a CSV text nor an XLSX workbook that can be read.';
		}
	},
	ignored: (names: readonly string[]) => `Left aside: ${names.join(', ')}.`,
	state_: (rows: number, faulty: number) =>
		faulty === 0 ? `${rows} rows, all in order.` : `${rows} rows, ${faulty} of them faulty.`,
	totals: (fresh: number, versions: number, unchanged: number) =>
		[
			`${fresh} new ${fresh === 1 ? 'material' : 'materials'}`,
			`${versions} new ${versions === 1 ? 'version' : 'versions'} of materials here`,
			`${unchanged} unchanged`
		].join(', '),
	show: 'Rows shown',
	showFaulty: 'Faulty',
	showAll: 'All',
	row: 'Row',
	outcomeHead: 'becomes',
	outcome: { faulty: 'faulty', newMaterial: 'new material', newVersion: 'new version', unchanged: 'unchanged' },
	fault: (fault: ImportFault) =>
		fault.field === 'material' ? sentence(fault) : `${head(fault.field)}: ${sentence(fault)}`,
	cell: (row: number, column: ImportColumn) => `Row ${row}, ${head(column)}`,
	mend: 'Judge again',
	mendOf: (row: number) => `Judge row ${row} again`,
	noneFaulty: 'No faulty row is left.',
	report: 'Report as CSV',
	commitTitle: 'Make the materials',
	commitHint: 'All of them, or none if anything goes wrong.',
	asDrafts: 'as drafts',
	asDraftsHint: 'Each is released by hand.',
	released: 'released',
	releasedHint: 'They answer from the effective day on; products that weigh them are told at once.',
	effectiveFrom: 'Effective from',
	commit: 'Make all',
	faultyReason: (faulty: number) =>
		`${faulty} ${faulty === 1 ? 'row is' : 'rows are'} faulty. Mend ${faulty === 1 ? 'it' : 'them'} here, or in the sheet and choose it again.`,
	discard: 'Give up this import',
	done: 'Made. The materials stand in the list.',
	toMaterials: 'To the materials',
	marginTitle: 'How it is judged',
	marginText:
		'Each cell by itself, then the rows of a material together: whether their ranges can sum to 100. A material that is here already gets a new version, unless the sheet says the same again.'
};
