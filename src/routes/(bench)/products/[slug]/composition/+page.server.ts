import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { batchDayOf } from '$lib/server/http/batch-day';
import { readProductComposition } from '$lib/server/services/product-composition';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, params, url }) =>
	orError(() => readProductComposition(signedIn(locals), params.slug, batchDayOf(url)));
