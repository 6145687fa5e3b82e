import { formatCount, plural } from '../format';
import type { DecimalSign } from '../format';

export const common = {
	product: 'Costmary',
	save: 'Save',
	cancel: 'Cancel',
	close: 'Close',
	open: 'Open',
	download: 'Download',
	undo: 'Undo',
	tryAgain: 'Try again',
	remove: 'Remove',
	none: 'none',
	filter: 'Filter',
	find: 'Find',
	csv: 'CSV',
	separator: '·',
	pageTitle: (title: string) => `${title} · Costmary`,
	shown: (shown: number, all: number, sign: DecimalSign) => `${formatCount(shown, sign)} of ${formatCount(all, sign)}`,
	tableScrolls: (caption: string) => `${caption}, table; scrolls sideways when narrow`,
	pager: {
		label: 'Pages',
		earlier: 'Earlier',
		later: 'Later',
		rows: (from: number, to: number, all: number, sign: DecimalSign) =>
			`Rows ${formatCount(from, sign)} to ${formatCount(to, sign)} of ${formatCount(all, sign)}`
	},
	file: {
		choose: 'Choose a file',
		chooseMany: 'Choose files',
		drop: 'Drop a file here',
		dropMany: 'Drop files here',
		limit: (size: string) => `Up to ${size} each.`,
		tooLarge: (name: string, size: string, limit: string) =>
			`${name} is ${size}; a file may have at most ${limit}. Nothing was sent.`,
		empty: (name: string) => `${name} has 0 bytes; a file needs at least one. Nothing was sent.`,
		waiting: 'waiting',
		sent: (sent: string, all: string) => `${sent} of ${all}`,
		finishing: 'being checked',
		done: 'stored',
		cancelled: 'cancelled; nothing was kept',
		lost: 'The connection was lost. Nothing was kept.',
		failed: (why: string) => `Not stored: ${why}`,
		cancelOf: (name: string) => `Cancel ${name}`,
		removeOf: (name: string) => `Remove ${name} from this list`,
		retryOf: (name: string) => `Try ${name} again`,
		progressOf: (name: string) => `Upload of ${name}`
	},
	progress: {
		count: (done: number, all: number, sign: DecimalSign) => `${formatCount(done, sign)} of ${formatCount(all, sign)}`,
		leave: 'You may leave; the result waits on your desk.',
		waiting: 'Waiting for its turn.',
		done: 'Finished.',
		failed: 'It could not be finished. Nothing was changed.',
		lost: 'The connection is gone; the work goes on. It is asked again in a moment.',
		openResult: 'Open the result'
	},
	readiness: {
		notBegun: 'not begun',
		incomplete: 'incomplete',
		ready: 'ready',
		outOfDate: 'out of date',
		beingRechecked: 'being re-checked'
	},
	finding: {
		within: 'within',
		exceeds: 'exceeds',
		cannotTellYet: 'cannot tell yet',
		notPermitted: 'not permitted here',
		trace: 'trace',
		labelDuty: 'label duty',
		changesOn: 'changes on a date',
		readTheEntry: 'read the entry',
		notInRuleBook: 'not in the rule book'
	},
	answer: {
		given: 'stated',
		earlier: 'stated for an earlier one',
		missing: 'not stated'
	},
	verdict: {
		supported: 'supported',
		conditional: 'supported with conditions',
		notYet: 'not yet',
		contradicted: 'contradicted by the formula',
		notAllowed: 'not allowed'
	},
	rung: {
		certain: 'certain',
		restsOnTypical: 'rests on typical',
		undecided: 'undecided',
		free: 'order is free',
		key: {
			certain: 'certain from the ranges',
			restsOnTypical: 'rests on typical values',
			undecided: 'undecided',
			free: 'order is free'
		}
	},
	strata: {
		label: (bands: number, hatched: number) =>
			`Composition as a bar of ${plural(bands, 'band', 'bands')}, to scale, joined to the rows of the list` +
			(hatched ? `; ${plural(hatched, 'band is', 'bands are')} undecided` : ''),
		percent: (value: string) => `${value} %`
	},
	ranges: {
		label: (name: string, low: string, high: string) => `${name}: ${low} to ${high}`,
		declared: 'declared',
		narrowed: 'narrowed by the sum',
		turns: 'where an answer turns'
	},
	balance: {
		label: 'Balance',
		ofHundred: 'of 100',
		phase: (code: string, share: string) => `${code} ${share}`
	},
	pages: {
		label: (pages: number, sections: number) =>
			`${plural(pages, 'page', 'pages')} in ${plural(sections, 'section', 'sections')}`,
		built: (built: number) => `; ${built} are built`,
		evidence: 'evidence'
	},
	diff: { added: 'added', removed: 'taken out' },
	together: 'Together'
};
