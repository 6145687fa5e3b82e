import { redirect } from '@sveltejs/kit';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readProductHead } from '$lib/server/services/products';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const { product } = await orError(() => readProductHead(signedIn(locals), params.slug));
	redirect(303, `/products/${product.slug}/list`);
};
