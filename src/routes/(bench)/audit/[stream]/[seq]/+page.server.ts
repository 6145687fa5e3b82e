import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readAuditRow } from '$lib/server/services/audit-trail';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => ({
	row: await orError(async () => readAuditRow(signedIn(locals), params.stream, params.seq))
});
