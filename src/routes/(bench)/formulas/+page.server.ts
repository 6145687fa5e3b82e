import { listQueryOf } from '$lib/schemas/paging';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readFormulas } from '$lib/server/services/formulas';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const query = listQueryOf(url.searchParams);
	return { page: await orError(() => readFormulas(signedIn(locals), query)), query };
};
