import { batchRequestOf, batchRequestSchema } from '$lib/schemas/batch-sheet';
import { versionNumberOf } from '$lib/schemas/version-number';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readBatchSheet } from '$lib/server/services/batch-sheets';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const sent = batchRequestOf(url.searchParams);
	const parsed = batchRequestSchema.safeParse(sent);
	// What was typed goes back to the form; the sheet beneath it is that of the usual batch until the figures can be read.
	const request = parsed.success ? parsed.data : batchRequestSchema.parse({});
	const wrong = parsed.success
		? null
		: { field: parsed.error.issues[0]?.path.join('.') ?? '', why: parsed.error.issues[0]?.message ?? '' };
	const view = await orError(() =>
		readBatchSheet(signedIn(locals), params.code, versionNumberOf(params.version) ?? 1, request)
	);
	const typed = { size: sent.size ?? request.size, step: sent.step ?? request.step, lots: sent.lots };
	return { ...view, typed, wrong, query: url.searchParams.toString() };
};
