import { createContext } from 'svelte';
import { en } from './en';
import { formatFor } from './format';
import type { Format } from './format';

/** The shape that every language satisfies. */
export type Text = typeof en;
export type Language = 'en';
export type { Format, DecimalSign } from './format';

const texts: Record<Language, Text> = { en };

export const textFor = (language: Language): Text => texts[language];

const [getText, setText] = createContext<Text>();
const [getFormat, setFormat] = createContext<Format>();

/** The sentences of the person's language: `const t = useText()`, then `t.materials.title`. */
export const useText = getText;
/** The person's way of writing dates and decimals: `const f = useFormat()`, then `f.date(iso)`. */
export const useFormat = getFormat;

/** Called once, by the root layout. Both are per request: a module variable would be shared by every visitor. */
export function provideText(language: Language, sign: Format['sign']): Text {
	setFormat(formatFor(sign));
	return setText(textFor(language));
}
