import { csvResponse } from '$lib/server/http/csv';
import { signedIn } from '$lib/server/http/signed-in';
import { batchDayOf, marketOf } from '$lib/server/http/batch-day';
import { readProductList } from '$lib/server/services/product-list';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const market = marketOf(url);
		const { product, list } = await readProductList(actor, params.slug, batchDayOf(url), market);
		return csvResponse(
			`${product.slug}-list-${market.toLowerCase()}.csv`,
			['no', 'name', 'low %', 'typical %', 'high %', 'block', 'place', 'materials'],
			(list?.entries ?? []).map((entry, index) => [
				index + 1,
				entry.name,
				entry.low,
				entry.typical,
				entry.high,
				entry.block,
				entry.place,
				entry.materials.join('; ')
			])
		);
	});
