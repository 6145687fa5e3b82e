import { batchRequestOf, batchRequestSchema } from '$lib/schemas/batch-sheet';
import { versionNumberOf } from '$lib/schemas/version-number';
import { attachment } from '$lib/server/http/attachment';
import { signedIn } from '$lib/server/http/signed-in';
import { printBatchSheet } from '$lib/server/services/batch-sheets';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params, url }) =>
	signedIn(locals, async (actor) => {
		const request = batchRequestSchema.catch(batchRequestSchema.parse({})).parse(batchRequestOf(url.searchParams));
		const number = versionNumberOf(params.version) ?? 1;
		return attachment(await printBatchSheet(actor, params.code, number, request));
	});
