import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readFamily } from '$lib/server/services/formula-family';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url }) => ({
	by: url.searchParams.get('by') === 'material' ? ('material' as const) : ('ingredient' as const),
	family: await orError(() => readFamily(signedIn(locals), params.code))
});
