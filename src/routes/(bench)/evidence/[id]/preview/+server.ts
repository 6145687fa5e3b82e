import { Readable } from 'node:stream';
import { error } from '@sveltejs/kit';
import { fileAddressSchema } from '$lib/schemas/document';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { previewOf } from '$lib/server/services/documents';
import type { RequestHandler } from './$types';

/** The file as a page of ours may show it: only kinds that run nothing, with a policy that would not let them. */
export const GET: RequestHandler = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const address = fileAddressSchema.safeParse(params);
	if (!address.success) error(404, { message: 'not-found', code: 'not-found' });
	const { body, mediaType, bytes } = await orError(() => previewOf(actor, address.data.id));
	return new Response(Readable.toWeb(body) as ReadableStream, {
		headers: {
			'content-type': mediaType,
			'content-length': String(bytes),
			'content-disposition': 'inline',
			'cache-control': 'private, no-store',
			'content-security-policy': "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'self'"
		}
	});
};
