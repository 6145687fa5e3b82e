import { compareQuerySchema } from '$lib/schemas/compare-view';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { compareVersions } from '$lib/server/services/formula-compare';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, params, url }) => {
	const { a, b } = compareQuerySchema.parse({ a: url.searchParams.get('a'), b: url.searchParams.get('b') });
	return orError(() => compareVersions(signedIn(locals), params.code, a, b));
};
