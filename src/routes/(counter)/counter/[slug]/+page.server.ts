import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readCounterProduct } from '$lib/server/services/counter';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, params }) =>
	orError(() => readCounterProduct(signedIn(locals), params.slug));
