import { listQueryOf } from '$lib/schemas/paging';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readMaterials } from '$lib/server/services/materials';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const query = { ...listQueryOf(url.searchParams), supplier: url.searchParams.get('supplier') ?? '' };
	const { page, suppliers } = await orError(() => readMaterials(signedIn(locals), query));
	return { page, suppliers, query };
};
