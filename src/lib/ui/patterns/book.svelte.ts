import { createContext } from 'svelte';

/** What spine, sheet and margin of one page share. */
export class BookState {
	/** The margin as a drawer; it matters only where the page is too narrow for a third column. */
	marginOpen = $state(false);
	hasMargin = $state(false);

	openMargin(): void {
		this.marginOpen = true;
	}
	closeMargin(): void {
		this.marginOpen = false;
	}
}

export const [useBook, provideBook] = createContext<BookState>();
