import { label } from './label';

export const counter = {
	title: 'Your products',
	sentence: (count: number) =>
		count === 0
			? 'The laboratory has no product of yours here yet.'
			: `${count} ${count === 1 ? 'product' : 'products'}.`,
	need: 'What do you need from me?',
	approved: 'What is approved?',
	changed: 'What changed?',
	nothingNeeded: 'Nothing at present.',
	nothingApproved:
		'No label copy is approved yet. The laboratory prepares it; you are asked here when it waits for you.',
	approveTitle: (pack: string, market: string) => `Approve the copy for ${pack}, ${market}`,
	approveText: 'Read every line. It becomes the text to print from once you have approved it.',
	approve: 'Approve',
	approveOf: (number: number | null) => `Approve copy ${number ?? ''}`,
	sendBack: 'Send back',
	sendBackOpen: 'Something must change',
	comment: 'What has to change?',
	commentMissing: 'Write what has to change; at most 1000 characters.',
	approvedNow: 'Thank you. The copy is approved and can be printed from.',
	sentBackNow: 'Your comment is with the laboratory. A new copy follows.',
	correctedTitle: (number: number | null) => `Copy ${number ?? ''} is being corrected`,
	correctedText:
		'It was waiting for you when the list changed. The laboratory sends a new one; you need to do nothing.',
	marketLong: { EU: 'European Union', GB: 'UK (GB)' } as Record<string, string>,
	copyLine: (pack: string, market: string, number: number | null) => `${pack}, ${market}, copy ${number ?? ''}`,
	approvedBy: (name: string, day: string) => `Approved by ${name} on ${day}.`,
	standing: {
		print: 'It is the copy to print from.',
		inUse: (batch: string) => `In use from batch ${batch}.`,
		outOfDate: 'It is out of date: do not print from it any more. The laboratory prepares the next copy.',
		beingRechecked: 'It is being re-checked; wait before you print.'
	},
	downloads: label.downloads,
	downloadOf: (form: string, number: number | null) => `${form} of copy ${number ?? ''}`,
	hash: 'SHA-256 of the text',
	showText: 'Show the full text',
	elements: label.elements,
	issues: 'Product file',
	issuesHead: { issue: 'Issue', date: 'Date', hash: 'SHA-256', file: 'File' },
	issueHeld: 'kept by the laboratory',
	issueDownload: (number: number) => `Download issue ${number}`,
	changes: (lines: number, number: number) => `${lines === 1 ? 'One line' : `${lines} lines`} since copy ${number}.`,
	noChanges: (number: number) => `The words are those of copy ${number}.`,
	firstCopy: 'This is the first copy of this pack.',
	effect: {
		formula: (day: string) => `A new version of the formula, ${day}, changed the list:`,
		material: (day: string) => `New data of a raw material, ${day}, changed the list:`,
		product: (day: string) => `The laboratory set the list anew, ${day}:`
	},
	untouched: (day: string) => `A release of ${day} left the text as it was.`,
	nothingChanged: 'Nothing.',
	sentBackTitle: (number: number | null, day: string) => `You sent copy ${number ?? ''} back on ${day}`,
	refused: (code: string, data: Readonly<Record<string, unknown>>): string | null => {
		const { state } = data;
		if (code === 'wrong-state' && state === 'approvedByClient')
			return 'This copy is approved already. Nothing was changed by pressing again.';
		if (code === 'wrong-state' && state === 'sentBack') return 'This copy was sent back already; a new one follows.';
		return label.refused(code, data);
	}
};
