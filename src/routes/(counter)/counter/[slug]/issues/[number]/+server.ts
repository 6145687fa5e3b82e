import { error } from '@sveltejs/kit';
import { issueNumberSchema } from '$lib/schemas/label-copy';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { sharedIssueAddress } from '$lib/server/services/counter';
import type { RequestHandler } from './$types';

/** Leads to the bucket by an address made for this request. */
export const GET: RequestHandler = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const number = issueNumberSchema.safeParse(params.number);
	if (!number.success) error(404, { message: 'not-found', code: 'not-found' });
	const location = await orError(() => sharedIssueAddress(actor, params.slug, number.data));
	return new Response(null, { status: 303, headers: { location, 'cache-control': 'no-store' } });
};
