/** One stroke of an icon in a box of 16 px: a line, or a filled shape, or a line of dashes. */
export interface Stroke {
	readonly d: string;
	readonly filled?: true;
	readonly dash?: string;
	readonly width?: number;
}

const LEAF = 'M8 1.4c4.4 3.6 4.6 8.8 0 13.2C3.4 10.2 3.6 5 8 1.4Z';
const SQUARE = 'M2.5 2.5h11v11h-11z';
const BLOCK = 'M4.5 3h7v6.5h-7z';
const dot = (x: number, y: number, r: number) =>
	`M${x - r} ${y}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0Z`;

const line = (d: string): readonly Stroke[] => [{ d }];

export const ICONS = {
	mark: [
		{ d: 'M2.9 3v11.4h10.2V3', width: 1.75 },
		{ d: 'M8 .5c3.9 3.1 4.3 7.5.65 11.7L8 5.2l-.65 7C3.7 8 4.1 3.6 8 .5Z', filled: true }
	],
	search: line(`${dot(7, 7, 4.5)}M10.5 10.5l3.5 3.5`),
	edit: line('M2.5 13.5l.6-3 7.6-7.6 2.4 2.4-7.6 7.6z'),
	add: line('M8 3v10M3 8h10'),
	close: line('M3.5 3.5l9 9M12.5 3.5l-9 9'),
	check: line('M2.5 8.5l3.5 3.5 7.5-8.5'),
	copy: line('M5.5 5.5h8v8h-8zM3 10.5h-.5v-8h8V3'),
	mail: line('M1.8 3.5h12.4v9H1.8zM1.8 4l6.2 5 6.2-5'),
	lock: line('M3.5 7h9v6.5h-9zM5.5 7V5a2.5 2.5 0 0 1 5 0v2'),
	download: line('M8 2v8.5M4.5 7 8 10.5 11.5 7M2.5 13.5h11'),
	upload: line('M8 10.5v-8M4.5 5.5 8 2l3.5 3.5M2.5 13.5h11'),
	undo: line('M5.5 3 2.5 6l3 3M2.5 6h7a3.5 3.5 0 0 1 0 7H6'),
	ascending: line('M8 13V3M5 6l3-3 3 3'),
	descending: line('M8 3v10M5 10l3 3 3-3'),
	down: line('M4 6.500l4 4 4-4'),
	more: line('M2.5 4h11M2.5 8h11M2.5 12h11'),
	margin: line('M2 2.500h12v11H2zM10 2.500v11'),
	file: line('M4 1.8h5.500L12.5 5v9.200H4zM9 2v3.500h3.5'),
	composition: line('M3 1.8h4v12.4H3zM3 9h4M3 11.8h4M10 4h3.5M10 9h3.5M10 12h3.5'),
	list: line('M5.5 3.5h8.5M5.5 8h8.500M5.5 12.5h8.500M2 3.500h.1M2 8h.1M2 12.500h.1'),
	claims: line('M2 2.500h12v8.500H8L4.5 14v-3H2zM5 5.500h6M5 8h4'),
	label: line('M2 2.500h5.500L14 9l-5 5-7-6.500zM5 5.500h.1'),
	desk: line('M2 5.500h12M3.5 5.500v8M12.5 5.500v8M9 5.500V9h3.5'),
	products: line('M5.5 1.800h5v3h-5zM4 4.800h8v9.400H4zM4 9h8'),
	materials: line('M6 1.800h4M6.8 1.800v4L3 13.2a.8.8 0 0 0 .8 1h8.400a.8.8 0 0 0 .8-1L9.2 5.800v-4M4.8 10.200h6.4'),
	formulas: line('M2.5 3h11M2.5 6.300h11M2.5 9.700h7M2.5 13h7M11.5 9.700v3.6'),
	evidence: line('M4 1.8h8v12.4H4zM6.5 5h3M6.5 7.500h3M6.5 10h2'),
	people: line(`${dot(8, 4.8, 2.8)}M2.5 14.2c0-3.2 2.400-5 5.500-5s5.500 1.800 5.500 5`),
	rules: line(
		'M8 3.500C6.5 2.3 4.5 2 2 2v10.500c2.5 0 4.5.3 6 1.5 1.5-1.2 3.5-1.5 6-1.500V2c-2.5 0-4.5.3-6 1.500ZM8 3.500V14'
	),

	leafReady: [{ d: LEAF, filled: true }, { d: LEAF }],
	leafIncomplete: [{ d: LEAF }, { d: 'M8 1.4v13.2C3.4 10.2 3.6 5 8 1.4Z', filled: true }],
	leafOutOfDate: line('M1.5 8.3C4.8 2.6 11.2 2.6 14.5 8.3 11.2 12.3 4.8 12.3 1.5 8.3ZM1.5 14.8h13'),
	leafNotBegun: [{ d: 'M4 8h8', dash: '1.5 2.5' }],
	leafBeingRechecked: [{ d: dot(8, 8, 5.5), dash: '2.2 2.6' }],

	within: [{ d: 'M11.5 1.8v12.4' }, { d: dot(5, 8, 2.7), filled: true }],
	exceeds: [{ d: 'M4.5 1.8v12.4' }, { d: dot(11, 8, 2.7), filled: true }],
	cannotTellYet: line('M8 1.8v12.4M2 8h12M2 5.5v5M14 5.5v5'),
	labelDuty: line('M3 1.8h10v12.4H3zM5.5 5.5h5M5.5 8h5M5.5 10.5h3'),
	changesOn: [{ d: 'M3 1.8v12.4', dash: '1.5 2.5' }, { d: 'M13 1.8v12.4M5.5 8H10M8.2 6l2 2-2 2' }],
	notPermitted: line(`${SQUARE}M2.5 13.5l11-11`),
	notInRuleBook: [{ d: SQUARE, dash: '2 2.2' }, { d: 'M6 6.2a2 2 0 1 1 2 2.2v.8M8 11.2v.1' }],
	trace: [{ d: 'M11.5 1.8v12.4' }, { d: `${dot(4, 5, 1)}${dot(7, 8, 1)}${dot(4, 11, 1)}`, filled: true }],
	readTheEntry: line(
		'M8 4C6.5 2.8 4.5 2.5 2 2.500V12.500c2.5 0 4.5.3 6 1.5 1.5-1.2 3.5-1.5 6-1.500V2.500c-2.5 0-4.5.3-6 1.500ZM8 4v10'
	),

	supported: [{ d: BLOCK, filled: true }, { d: BLOCK }, { d: 'M1.5 13h13', width: 2 }],
	conditional: [{ d: BLOCK, filled: true }, { d: BLOCK }, { d: 'M1.5 13h13', width: 2, dash: '2.4 3' }],
	notYet: [{ d: BLOCK }, { d: 'M1.5 13h13', dash: '.1 3' }],
	contradicted: [{ d: BLOCK }, { d: 'M1.5 13h13', width: 2 }, { d: 'M2.5 11l11-9.5' }],

	given: [{ d: 'M3 3h10v10H3z', filled: true }, { d: 'M3 3h10v10H3z' }],
	earlier: line('M3 3h10v10H3zM3 8l5-5M3 13 13 3M8 13l5-5'),
	missing: line('M3 3h10v10H3z'),
	bracket: line('M6 2H3v12h3'),
	bracketSilenced: [{ d: 'M6 2H3v12h3', dash: '1.5 2.5' }],
	ringToDot: [{ d: `${dot(4, 8, 2.5)}M6.5 8h4` }, { d: dot(12, 8, 1.8), filled: true }]
} as const satisfies Record<string, readonly Stroke[]>;

export type IconName = keyof typeof ICONS;
