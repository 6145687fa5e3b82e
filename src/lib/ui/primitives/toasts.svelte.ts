import { createContext } from 'svelte';

export interface Toast {
	readonly id: number;
	readonly tone: 'ok' | 'bad';
	readonly text: string;
	/** Undo or try again. */
	readonly act?: { readonly label: string; readonly run: () => void };
}

/** What happened, then what can be done. Handed down by context: a module variable would be shared on the server. */
export class Toasts {
	#next = 0;
	items = $state.raw<readonly Toast[]>([]);

	show(tone: Toast['tone'], text: string, act?: Toast['act']): number {
		const id = this.#next++;
		this.items = [...this.items, { id, tone, text, act }];
		return id;
	}

	close(id: number): void {
		this.items = this.items.filter((toast) => toast.id !== id);
	}
}

export const [useToasts, provideToasts] = createContext<Toasts>();
