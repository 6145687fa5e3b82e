import type { Attachment } from 'svelte/attachments';

const PAGE_STEP = 10;

/** Where a key moves the focus among `count` rows; null when the key moves nothing. */
export function nextRow(count: number, current: number, key: string): number | null {
	if (count === 0) return null;
	const last = count - 1;
	const clamp = (index: number) => Math.max(0, Math.min(last, index));
	switch (key) {
		case 'ArrowDown':
			return clamp(current + 1);
		case 'ArrowUp':
			return clamp(current - 1);
		case 'PageDown':
			return clamp(current + PAGE_STEP);
		case 'PageUp':
			return clamp(current - PAGE_STEP);
		case 'Home':
			return 0;
		case 'End':
			return last;
		default:
			return null;
	}
}

interface Handlers {
	onrow?: (key: string) => void;
	onopen?: (key: string) => void;
}

const ROW = 'tr[data-row]';
const rowsOf = (table: HTMLElement) => [...table.querySelectorAll<HTMLTableRowElement>(ROW)];
const keyOf = (row: HTMLElement) => row.dataset.row ?? '';

/** A caret moves inside a field by the same keys, so those keep them. */
const takesKeys = (target: EventTarget | null) =>
	target instanceof HTMLElement && target.closest('input, select, textarea, [contenteditable]') !== null;

/** One row at a time is in the tab order; it is the page's current one, or else the first. */
function rove(table: HTMLElement) {
	const rows = rowsOf(table);
	const focused = rows.find((row) => row === document.activeElement);
	const current = focused ?? rows.find((row) => row.ariaCurrent === 'true') ?? rows[0];
	for (const row of rows) {
		const index = row === current ? 0 : -1;
		if (row.tabIndex !== index || !row.hasAttribute('tabindex')) row.tabIndex = index;
	}
}

/**
 * Rows (`<tr data-row="key">`) of a table that arrow keys move between; Enter opens. The page hears of the row that
 * has the focus and marks it with aria-current, which draws its ground and its leader.
 */
export const focusRows =
	(handlers: () => Handlers): Attachment<HTMLTableElement> =>
	(table) => {
		const moved = (event: FocusEvent) => {
			const row = (event.target as HTMLElement).closest<HTMLElement>(ROW);
			if (!row) return;
			handlers().onrow?.(keyOf(row));
			rove(table);
		};
		const pressed = (event: KeyboardEvent) => {
			if (event.altKey || event.ctrlKey || event.metaKey || takesKeys(event.target)) return;
			const row = (event.target as HTMLElement).closest<HTMLElement>(ROW);
			if (!row) return;
			if (event.key === 'Enter' && event.target === row) {
				event.preventDefault();
				handlers().onopen?.(keyOf(row));
				return;
			}
			const rows = rowsOf(table);
			const next = nextRow(rows.length, rows.indexOf(row as HTMLTableRowElement), event.key);
			if (next === null) return;
			event.preventDefault();
			rows[next]?.focus();
		};
		table.addEventListener('focusin', moved);
		table.addEventListener('keydown', pressed);
		// Rows come and go with filters and saves; whichever stand there, one of them can be reached by Tab.
		const observer = new MutationObserver(() => rove(table));
		observer.observe(table, { childList: true, subtree: true, attributeFilter: ['aria-current', 'data-row'] });
		rove(table);
		return () => {
			observer.disconnect();
			table.removeEventListener('focusin', moved);
			table.removeEventListener('keydown', pressed);
		};
	};
