import { documentFilterSchema } from '$lib/schemas/document';
import { listQueryOf } from '$lib/schemas/paging';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { expiringBy, searchDocuments } from '$lib/server/services/documents';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = signedIn(locals);
	const filter = documentFilterSchema.parse(Object.fromEntries(url.searchParams));
	const query = { ...listQueryOf(url.searchParams), ...filter };
	const expiresBy = filter.show === 'expiring' ? expiringBy() : null;
	const page = await orError(() => searchDocuments(actor, { ...query, expiresBy }));
	return { page, query, expiringBy: expiringBy(), mayAttach: may(actor, 'attachDocument') };
};
