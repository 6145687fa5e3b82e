import { deserialize } from '$app/forms';
import type { ActionResult } from '@sveltejs/kit';

type RefusalCode = App.Superforms.Message['code'];

export interface JsonRefusal {
	readonly code: RefusalCode;
	readonly faults: readonly {
		readonly path: string;
		readonly value: string;
		readonly limit: string | null;
		readonly why: string;
	}[];
	readonly data: Readonly<Record<string, unknown>>;
}

/** Sends one JSON text to a form action of the present page. @throws when the connection is gone. */
export async function postJson<T>(
	action: string,
	payload: unknown
): Promise<ActionResult<{ result: T }, { refused: JsonRefusal }>> {
	const body = new FormData();
	body.set('payload', JSON.stringify(payload));
	const response = await fetch(`?/${action}`, { method: 'POST', body, headers: { 'x-sveltekit-action': 'true' } });
	// Signed out: the answer is the page of the door.
	if (response.redirected) return { type: 'redirect', status: response.status, location: response.url };
	return deserialize<{ result: T }, { refused: JsonRefusal }>(await response.text());
}
