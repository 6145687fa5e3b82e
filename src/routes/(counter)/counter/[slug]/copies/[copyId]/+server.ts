import { downloadFormSchema, labelAddressSchema } from '$lib/schemas/label-copy';
import { attachment } from '$lib/server/http/attachment';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { downloadCopy } from '$lib/server/services/copy-print';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const { copyId } = addressOf({ copyId: params.copyId }, labelAddressSchema);
		const form = downloadFormSchema.parse(url.searchParams.get('as'));
		return attachment(await downloadCopy(actor, params.slug, copyId, form));
	});
