import { redirect } from '@sveltejs/kit';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readCounter } from '$lib/server/services/counter';
import { paths } from '$lib/ui/paths';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const view = await orError(() => readCounter(signedIn(locals)));
	const [only] = view.products;
	// Whoever has one product has nothing to choose.
	if (only && view.products.length === 1) redirect(303, paths.counterProduct(only.slug));
	return view;
};
