import { describe, expect, test } from 'vitest';
import { COLOURS } from './tokens';
import type { Colour } from './tokens';

/** Relative luminance and contrast as WCAG 2.2 defines them. */
function luminance(hex: string): number {
	const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
		const share = parseInt(hex.slice(at, at + 2), 16) / 255;
		return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
	});
	return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}
function contrast(one: string, other: string): number {
	const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
	return (light + 0.05) / (dark + 0.05);
}

const GROUNDS: readonly Colour[] = ['paper', 'sheet', 'wash', 'leaf-tint'];
const TEXTS: readonly Colour[] = ['ink', 'ink-soft', 'leaf', 'tansy', 'madder', 'woad'];
const pairs: (readonly [text: Colour, ground: Colour])[] = [
	...TEXTS.flatMap((text) => GROUNDS.map((ground) => [text, ground] as const)),
	['on-leaf', 'leaf'],
	['sheet', 'ink'],
	['tansy', 'tansy-tint'],
	['madder', 'madder-tint'],
	['woad', 'woad-tint']
];

describe.each([
	['light', 0],
	['dark', 1]
] as const)('%s', (_, theme) => {
	test.each(pairs)('%s is read on %s', (text, ground) => {
		expect(contrast(COLOURS[text][theme], COLOURS[ground][theme])).toBeGreaterThanOrEqual(4.5);
	});
	test.each(['paper', 'sheet'] as const)('an edge is seen on %s', (ground) => {
		expect(contrast(COLOURS.edge[theme], COLOURS[ground][theme])).toBeGreaterThanOrEqual(3);
	});
});
