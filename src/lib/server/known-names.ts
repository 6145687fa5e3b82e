import { colourIndexIn } from '$lib/domain/ingredients/colour-names';
import { substanceKey } from '$lib/domain/material/substance-key';
import { KNOWN_NAMES } from '$lib/reference/names';

const KEYS: ReadonlySet<string> = new Set(KNOWN_NAMES.map(substanceKey));

/** Whether a name is in the glossary as far as this edition knows it; colour index numbers always are. */
export const isKnownName = (inci: string): boolean => KEYS.has(substanceKey(inci)) || colourIndexIn(inci) !== null;
