import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { batchDayOf } from '$lib/server/http/batch-day';
import { readProductList } from '$lib/server/services/product-list';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const batchDay = batchDayOf(url);
	return { batchDay, ...(await orError(() => readProductList(signedIn(locals), params.slug, batchDay))) };
};
