import { uploadAddressSchema } from '$lib/schemas/upload';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { abortUpload } from '$lib/server/services/uploads';
import type { RequestHandler } from './$types';

export const DELETE: RequestHandler = ({ locals, params }) =>
	signedIn(locals, async (actor) => {
		await abortUpload(actor, addressOf(params, uploadAddressSchema).id);
		return new Response(null, { status: 204 });
	});
