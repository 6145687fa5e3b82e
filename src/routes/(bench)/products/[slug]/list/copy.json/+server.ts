import { signedIn } from '$lib/server/http/signed-in';
import { batchDayOf, marketOf } from '$lib/server/http/batch-day';
import { readProductList } from '$lib/server/services/product-list';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const market = marketOf(url);
		const { product, basis, list } = await readProductList(actor, params.slug, batchDayOf(url), market);
		return Response.json(
			{ market, product: product.name, basis, list },
			{ headers: { 'content-disposition': `attachment; filename="${product.slug}-list-${market.toLowerCase()}.json"` } }
		);
	});
