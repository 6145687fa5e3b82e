import { config } from '$lib/server/config';
import { signedIn } from '$lib/server/access/signed-in';
import { workspaceCounts } from '$lib/server/services/shell';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals }) => {
	const actor = signedIn(locals);
	return {
		shell: {
			person: { name: actor.name, email: actor.email },
			roles: [...actor.roles],
			singleKeys: actor.singleKeys,
			workspace: { name: config().workspaceName, words: await workspaceCounts(actor) }
		}
	};
};
