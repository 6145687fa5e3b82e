import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readProductHead } from '$lib/server/services/products';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals, params }) => {
	const { product, packs } = await orError(() => readProductHead(signedIn(locals), params.slug));
	const packLines = packs.map(({ size, unit }) => `${size.replace(/\.?0+$/, '')} ${unit}`);
	return {
		spineProduct: {
			slug: product.slug,
			name: product.name,
			lines: [[product.clientName, ...packLines].join(' · '), product.stay],
			parts: {}
		}
	};
};
