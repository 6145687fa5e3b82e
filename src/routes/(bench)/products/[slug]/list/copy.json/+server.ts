import { signedIn } from '$lib/server/http/signed-in';
import { batchDayOf } from '$lib/server/http/batch-day';
import { readProductList } from '$lib/server/services/product-list';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const { product, basis, list } = await readProductList(actor, params.slug, batchDayOf(url));
		return Response.json(
			{ market: 'EU', product: product.name, basis, list },
			{ headers: { 'content-disposition': `attachment; filename="${product.slug}-list-eu.json"` } }
		);
	});
