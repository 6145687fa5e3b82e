import { uploadPartSchema } from '$lib/schemas/upload';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { putPart } from '$lib/server/services/uploads';
import type { RequestHandler } from './$types';

export const PUT: RequestHandler = ({ locals, params, request }) =>
	signedIn(locals, async (actor) => {
		const { id, n } = addressOf(params, uploadPartSchema);
		return Response.json(await putPart(actor, id, n, request.body ?? new Blob().stream()));
	});
