/** The one table of colours: [light, dark]. The stylesheet's blocks and Tailwind's names are both made from it. */
export const COLOURS = {
	paper: ['#F6F3EB', '#141A17'],
	sheet: ['#FFFFFF', '#1B231F'],
	wash: ['#F8F6F0', '#212A26'],
	ink: ['#1C2923', '#E9EEE9'],
	'ink-soft': ['#54625A', '#A7B5AC'],
	rule: ['#DDD8CB', '#33403A'],
	edge: ['#868A7E', '#72827A'],
	leaf: ['#23604A', '#7FC4A4'],
	'leaf-tint': ['#E1EEE7', '#1F3A2F'],
	'on-leaf': ['#FFFFFF', '#0F1D17'],
	tansy: ['#855700', '#E6B84D'],
	'tansy-tint': ['#FBF0D6', '#3A2F14'],
	madder: ['#9A2C3B', '#F09AA3'],
	'madder-tint': ['#F8E3E4', '#45191F'],
	woad: ['#2C527F', '#9CC0EA'],
	'woad-tint': ['#E2EAF4', '#1B2C41'],
	'band-1': ['#E4EAE3', '#2A3731'],
	'band-2': ['#C3D2C6', '#3C5046'],
	'band-3': ['#9DB6A5', '#55705F']
} as const satisfies Record<string, readonly [light: string, dark: string]>;

export type Colour = keyof typeof COLOURS;

/** Sizes in px, size and line. Nothing is set under 12 px but axis figures and keys. */
export const TYPE = {
	display: [40, 48],
	title: [26, 32],
	question: [24, 32],
	heading: [17, 24],
	body: [15, 22],
	table: [13.5, 20],
	side: [13, 20],
	label: [12, 16],
	axis: [11, 16]
} as const satisfies Record<string, readonly [size: number, line: number]>;

/** Where the page changes its shape, in px. */
export const BREAKS = { mid: 700, broad: 1100, full: 1280 } as const;

const column = (theme: 0 | 1): Record<string, string> =>
	Object.fromEntries(Object.entries(COLOURS).map(([name, pair]) => [`--${name}`, pair[theme]]));

const LIGHT = { 'color-scheme': 'light', ...column(0) };
const DARK = { 'color-scheme': 'dark', ...column(1) };

/** The rules that give every theme its values. Without a choice the reader's system decides. */
export const themeRules = {
	':root': LIGHT,
	":root[data-theme='dark']": DARK,
	'@media (prefers-color-scheme: dark)': { ":root:not([data-theme='light'], [data-theme='dark'])": DARK }
};

export const colourNames: Record<string, string> = Object.fromEntries(
	Object.keys(COLOURS).map((name) => [name, `var(--${name})`])
);

const rem = (px: number) => `${px / 16}rem`;

export const fontSizes: Record<string, [string, string]> = Object.fromEntries(
	Object.entries(TYPE).map(([name, [size, line]]) => [name, [rem(size), rem(line)]])
);

export const screens: Record<string, string> = Object.fromEntries(
	Object.entries(BREAKS).map(([name, px]) => [name, rem(px)])
);
