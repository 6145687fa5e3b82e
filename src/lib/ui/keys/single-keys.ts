import type { WorkspacePlace } from '../shell/types';

/** Which letter goes where after `g`. */
export const GO_KEYS: Readonly<Record<string, WorkspacePlace>> = {
	d: 'desk',
	p: 'products',
	m: 'materials',
	f: 'formulas',
	e: 'evidence',
	r: 'rules'
};

export type KeyDeed =
	{ readonly deed: 'search' | 'edit' | 'help' | 'wait' } | { readonly deed: 'go'; readonly place: WorkspacePlace };

/** What a single key does; `waiting` after a `g`. Null when it does nothing. */
export function keyDeed(key: string, waiting: boolean): KeyDeed | null {
	if (waiting) {
		const place = GO_KEYS[key];
		return place ? { deed: 'go', place } : null;
	}
	switch (key) {
		case '/':
			return { deed: 'search' };
		case 'e':
			return { deed: 'edit' };
		case '?':
			return { deed: 'help' };
		case 'g':
			return { deed: 'wait' };
		default:
			return null;
	}
}

const TAKES_TEXT = 'input, select, textarea, [contenteditable], dialog[open]';

/** Single keys rest while the person types, holds a modifier, or answers a dialog. */
export const isSingleKey = (event: KeyboardEvent): boolean =>
	!event.defaultPrevented &&
	!event.altKey &&
	!event.ctrlKey &&
	!event.metaKey &&
	!(event.target instanceof Element && event.target.closest(TAKES_TEXT));
