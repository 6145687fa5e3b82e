import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readRule } from '$lib/server/services/rule-pages';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => ({
	rule: await orError(async () => readRule(signedIn(locals), params.act, params.entry))
});
