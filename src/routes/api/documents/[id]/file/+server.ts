import { fileAddressSchema, fileQuerySchema } from '$lib/schemas/document';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { downloadAddress } from '$lib/server/services/documents';
import type { RequestHandler } from './$types';

/** Leads to the bucket by an address that is made for this request and works for a minute. */
export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const { id } = addressOf(params, fileAddressSchema);
		const { as } = fileQuerySchema.parse({ as: url.searchParams.get('as') });
		const location = await downloadAddress(actor, id, as);
		return new Response(null, { status: 303, headers: { location, 'cache-control': 'no-store' } });
	});
