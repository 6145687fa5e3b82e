import { uploadBeginSchema } from '$lib/schemas/upload';
import { jsonBody } from '$lib/server/http/json-body';
import { signedIn } from '$lib/server/http/signed-in';
import { beginUpload } from '$lib/server/services/uploads';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = ({ locals, request }) =>
	signedIn(locals, async (actor) => {
		const announced = await jsonBody(request, uploadBeginSchema);
		return Response.json(await beginUpload(actor, announced), { status: 201 });
	});
