import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readProductHead } from '$lib/server/services/products';
import { readProductParts } from '$lib/server/services/shell';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const [{ product, packs }, parts] = await orError(() =>
		Promise.all([readProductHead(actor, params.slug), readProductParts(actor, params.slug)])
	);
	const packLines = packs.map(({ size, unit }) => `${size.replace(/\.?0+$/, '')} ${unit}`);
	const { ready, all } = parts.file.figures ?? { ready: 0, all: 0 };
	return {
		spineProduct: {
			slug: product.slug,
			name: product.name,
			lines: [[product.clientName, ...packLines].join(' · '), product.stay],
			parts: {
				formula: { state: parts.formula.state },
				list: { state: parts.list.state },
				label: { state: parts.label.state },
				file: { state: parts.file.state, word: `${ready}/${all}` }
			}
		}
	};
};
