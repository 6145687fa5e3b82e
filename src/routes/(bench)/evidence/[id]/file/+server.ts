import { error } from '@sveltejs/kit';
import { fileAddressSchema, fileQuerySchema } from '$lib/schemas/document';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { downloadAddress } from '$lib/server/services/documents';
import type { RequestHandler } from './$types';

/** Leads to the bucket by an address made for this request; an old one that has run out is never asked for again. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	const actor = signedIn(locals);
	const address = fileAddressSchema.safeParse(params);
	if (!address.success) error(404, { message: 'not-found', code: 'not-found' });
	const { as } = fileQuerySchema.parse({ as: url.searchParams.get('as') });
	const location = await orError(() => downloadAddress(actor, address.data.id, as));
	return new Response(null, { status: 303, headers: { location, 'cache-control': 'no-store' } });
};
