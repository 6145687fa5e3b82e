import { config } from '$lib/server/config';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readCounter } from '$lib/server/services/counter';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals }) => {
	const actor = signedIn(locals);
	const { client, products } = await orError(() => readCounter(actor));
	return {
		shell: {
			person: { name: actor.name, email: actor.email },
			client,
			workspace: { name: config().workspaceName },
			products
		}
	};
};
