import type { CopyFault, LabelElement } from '$lib/domain/label/types';
import type { CopyStateName, ElementSource } from '$lib/schemas/copy-view';

const elements: Record<LabelElement, string> = {
	brand: 'Brand',
	name: 'Name',
	function: 'Function',
	nominalContent: 'Nominal content',
	directions: 'Directions',
	precautions: 'Precautions',
	ingredients: 'Ingredients',
	durability: 'Durability',
	batch: 'Batch',
	responsiblePerson: 'Responsible person',
	origin: 'Country of origin'
};

const states: Record<CopyStateName, string> = {
	draft: 'draft',
	inReview: 'in review',
	sentBack: 'sent back',
	approvedByLaboratory: 'approved by the laboratory',
	approvedByClient: 'approved by the client',
	inUse: 'in use',
	superseded: 'superseded'
};

const sources: Record<ElementSource, string> = {
	product: 'The product’s own wording',
	pack: 'The pack’s content',
	market: 'The responsible person of this market',
	list: 'The ingredient list, read from the composition',
	copy: 'Written for this copy'
};

/** Reasons beyond the copy's own faults that a step may be refused for. */
type Fault = CopyFault | { readonly kind: 'outOfDate' | 'overtaken' };

function fault(of: Fault): string {
	switch (of.kind) {
		case 'missing':
			return `${elements[of.element]} is missing.`;
		case 'nothingReleased':
			return 'The formula has no released version, so there is no list to print.';
		case 'contradictory':
			return 'The formula or one of its materials contradicts itself, so there is no list to print.';
		case 'beingRechecked':
			return 'What the list rests on has changed and is being re-checked.';
		case 'orderDependsOnRange':
			return `The order of ${of.before} and ${of.after} depends on a supplier’s range.`;
		case 'eMarkOutsideScope':
			return `The e-mark is for 5 g or ml up to 10 kg or l; this pack holds ${of.size} ${of.unit}.`;
		case 'outOfDate':
			return 'The copy is out of date: the list reads otherwise now. Send it back and submit the new text.';
		case 'overtaken':
			return 'A later copy of this pack and market is approved; put that one in use.';
	}
}

const stateWord = (state: unknown) =>
	typeof state === 'string' && state in states ? states[state as CopyStateName] : '';

/** What a refused step says here; null where the general sentence does. */
function refused(code: string, data: Readonly<Record<string, unknown>>): string | null {
	if (code === 'wrong-state' && 'state' in data)
		return `This copy is ${stateWord(data['state'])} by now, so the step no longer fits. Nothing was changed; the page shows where it stands.`;
	if (code === 'exists' && 'state' in data)
		return `A copy of this pack and market is on its way already (${stateWord(data['state'])}).`;
	if (code === 'blocked' && Array.isArray(data['faults'])) return (data['faults'] as Fault[]).map(fault).join(' ');
	if (code === 'blocked' && Array.isArray(data['questions']))
		return 'Something cannot be told yet; write down why the copy may pass all the same.';
	if (code === 'invalid' && data['field'] === 'lastBatch')
		return 'Another copy is in use; name the last batch that carries it.';
	if (code === 'conflict' && 'contentHash' in data)
		return 'The text has changed since you opened this page. Read it again.';
	return null;
}

export const label = {
	title: 'Label',
	sentence: (pack: string, missing: number, all: number) =>
		missing === 0
			? `${pack}. ${all} of ${all} elements stand in place.`
			: `${pack}. ${all - missing} of ${all} elements stand in place.`,
	sentenceNone: (pack: string) => `${pack}. No copy has been begun.`,
	running: (formula: string, number: number, day: string, ruleBook: string) =>
		`${formula}, version ${number}, released ${day} · rule book ${ruleBook}`,
	pack: 'Pack',
	market: 'Market',
	markets: { EU: 'EU', GB: 'UK (GB)' } as Record<string, string>,
	copyNumber: (number: number | null) => (number === null ? 'no number yet' : `copy ${number}`),
	states,
	outOfDate: 'out of date',
	beingRechecked: 'being re-checked',
	overtaken: 'a later copy is approved',
	begin: 'Begin a copy',
	beginNext: 'Begin the next copy',
	emptyTitle: 'No copy yet',
	empty:
		'The copy of one pack and one market belongs here: its words, the list by reference, who approved it and from which batch it is used.',
	emptyReader: 'An officer begins the copy; it is read here then.',
	whatStandsWhere: 'What stands where',
	head: { element: 'Element', copy: 'Copy', requiredBy: 'Required by', state: 'State' },
	elements,
	notAsked: 'not asked for',
	house: 'house rule',
	elementState: {
		inPlace: 'in place',
		missing: 'missing',
		absent: 'none',
		exempt: 'not needed',
		frozen: 'frozen',
		weak: (places: number) => `${places} weak ${places === 1 ? 'place' : 'places'}`
	},
	listTitle: 'The list that this copy prints',
	listByReference: 'Read from the composition; it cannot be typed here.',
	listFrozen: 'As it was frozen at review.',
	listLink: 'Ingredient list with its reasons',
	listNone: 'No list can be made yet.',
	ingredients: 'Ingredients:',
	open: 'What refuses this copy',
	questions: 'What asks for a reason',
	question: (name: string, low: string, high: string, limit: string) =>
		`${name}: between ${low} % and ${high} %; named above ${limit} %.`,
	why: (reason: string) => `Recorded reason: ${reason}`,
	fault,
	refused,
	steps: {
		title: 'State',
		names: ['draft', 'in review', 'approved by the laboratory', 'approved by the client', 'in use', 'superseded'],
		here: 'now'
	},
	edit: 'Words of the draft',
	fields: {
		brand: 'Brand',
		name: 'Name',
		function: 'Function',
		eMark: (size: string, unit: string) => `e-mark beside ${size} ${unit}`,
		directions: 'Directions',
		precautions: 'Precautions',
		durability: 'Durability',
		months: 'Months',
		monthsHint: 'Best before: up to 30, counted from filling. After opening: as in the open jar.',
		reason: 'Why durability after opening is not relevant',
		batch: 'Where the batch is printed',
		responsibleName: 'Responsible person',
		responsibleAddress: 'Address',
		imported: 'Imported into the market',
		origin: 'Country of origin'
	},
	durabilities: {
		open: 'not chosen yet',
		bestBefore: 'best before a date (up to 30 months)',
		periodAfterOpening: 'period after opening (keeps longer than 30 months)',
		notNeeded: 'neither: not relevant after opening'
	},
	fieldFaults: {
		monthsNotWhole: (value: string) => `“${value}” is no whole number of months; at least 1.`,
		monthsAboveMost: (value: string, limit: number) => `“${value}” months is more than ${limit}.`,
		reasonMissing: 'The reason is missing.',
		tooLong: (field: string) => `${field}: this is too long.`
	},
	saved: 'The draft is saved.',
	theirs: 'Somebody else saved this draft in the meantime. Their words stand here; yours are still in the form.',
	takeTheirs: 'Take theirs',
	saveMine: 'Save mine over it',
	submit: 'Submit for review',
	submitNote: 'Submitting freezes the words and the list under one hash.',
	unsaved: 'Save the draft first.',
	reason: 'Reason',
	reasonHint: 'Needed where something cannot be told yet.',
	approve: 'Approve for the laboratory',
	sendBack: 'Send back',
	comment: 'What has to change',
	commentMissing: 'Write what has to change; at most 1000 characters.',
	putInUse: 'Put in use',
	firstBatch: 'First batch with this copy',
	lastBatch: (number: number | null) => `Last batch with copy ${number ?? ''}`,
	batchMissing: 'The batch is missing, or longer than 60 characters.',
	waitsForClient: 'The client approves next, on their own page.',
	notYours: 'An officer does this.',
	downloads: { pdf: 'PDF', txt: 'Text', json: 'JSON' },
	downloadMarked: 'Downloads carry a mark until the client has approved and while the copy stands.',
	approvals: 'Decisions',
	noApprovals: 'Nobody has decided yet.',
	approval: (role: 'officer' | 'client', decision: 'approved' | 'sentBack') =>
		`${role === 'officer' ? 'For the laboratory' : 'For the client'}: ${decision === 'approved' ? 'approved' : 'sent back'}`,
	byOn: (name: string, day: string) => `${name}, ${day}`,
	changedTitle: 'Why it is out of date',
	changed: (cause: string, day: string) => `${cause}, released ${day}, changed the list:`,
	untouched: (cause: string, day: string) => `${cause}, released ${day}: the text stayed as it was.`,
	oldText: 'Frozen text',
	newText: 'Text now',
	effects: 'What releases did to this copy',
	history: 'Copies of this pack and market',
	historyHead: { copy: 'Copy', state: 'State', batches: 'Batches', begun: 'Begun' },
	batches: (first: string | null, last: string | null) =>
		first === null ? '' : last === null ? `from ${first}` : `${first} to ${last}`,
	hash: 'SHA-256 of the text',
	marginTitle: 'Where the words come from',
	marginHint: 'Choose an element: its words, where they come from, the rule that asks for it and who decided.',
	placeOf: (number: number, all: number) => `element ${number} of ${all}`,
	trail: {
		printed: 'Printed line',
		nothing: 'nothing is printed',
		from: 'From',
		rule: 'Rule',
		decision: 'Decision',
		noDecision: 'not decided yet'
	},
	sources,
	decided: (state: CopyStateName) => (state === 'draft' ? 'Last saved' : `Now ${states[state]}`),
	folio: 'Sheet 5 of 6'
};
