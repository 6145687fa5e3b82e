import { uploadAddressSchema, uploadCompleteSchema } from '$lib/schemas/upload';
import { jsonBody } from '$lib/server/http/json-body';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { completeUpload } from '$lib/server/services/uploads';
import type { RequestHandler } from './$types';

/** A body is optional: with one, the document is filed in the same step. */
const sendsJson = (request: Request): boolean =>
	request.headers.get('content-type')?.startsWith('application/json') ?? false;

export const POST: RequestHandler = ({ locals, params, request }) =>
	signedIn(locals, async (actor) => {
		const { id } = addressOf(params, uploadAddressSchema);
		const { document } = sendsJson(request) ? await jsonBody(request, uploadCompleteSchema) : { document: null };
		return Response.json(await completeUpload(actor, id, document ?? null));
	});
