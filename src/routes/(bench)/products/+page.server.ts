import { listQueryOf } from '$lib/schemas/paging';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readProducts } from '$lib/server/services/products';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = signedIn(locals);
	const query = listQueryOf(url.searchParams);
	return { page: await orError(() => readProducts(actor, query)), query, mayEdit: may(actor, 'editProduct') };
};
