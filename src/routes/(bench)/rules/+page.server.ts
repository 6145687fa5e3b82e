import { listQueryOf } from '$lib/schemas/paging';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readRules } from '$lib/server/services/rule-pages';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const query = listQueryOf(url.searchParams);
	return { ...(await orError(async () => readRules(signedIn(locals), query))), query };
};
