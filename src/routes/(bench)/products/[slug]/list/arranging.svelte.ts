import { invalidateAll } from '$app/navigation';
import { postJson } from '$lib/ui/post-json';
import type { RefusalView } from '$lib/schemas/list-view';

/** Names moved one at a time: each move is judged by the server at once, and taken back when it is unlawful. */
export class Arranging {
	on = $state(false);
	busy = $state(false);
	refusals = $state.raw<readonly RefusalView[]>([]);
	/** A refusal that no place of the list explains. */
	failed = $state(false);

	constructor(
		private readonly market: () => string,
		private readonly names: () => readonly string[]
	) {}

	/** Puts a name before the one that stands at `to`; beyond the end it becomes the last. */
	move(name: string, to: number): Promise<void> {
		const names = this.names();
		const from = names.indexOf(name);
		if (from < 0 || to < 0 || to > names.length || to === from || to === from + 1) return Promise.resolve();
		const others = names.filter((each) => each !== name);
		others.splice(to > from ? to - 1 : to, 0, name);
		return this.#send(others);
	}

	/** Takes the usual order back. */
	reset = (): Promise<void> => this.#send([]);

	async #send(names: readonly string[]): Promise<void> {
		this.busy = true;
		this.failed = false;
		try {
			const result = await postJson<unknown>('arrange', { market: this.market(), names });
			this.refusals =
				result.type === 'failure' ? ((result.data?.refused.data['refusals'] ?? []) as readonly RefusalView[]) : [];
			this.failed = result.type !== 'success' && this.refusals.length === 0;
			await invalidateAll();
		} catch {
			this.failed = true;
		} finally {
			this.busy = false;
		}
	}
}
