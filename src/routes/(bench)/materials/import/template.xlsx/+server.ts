import { signedIn } from '$lib/server/access/signed-in';
import { requireAct } from '$lib/server/access/acts';
import { orError } from '$lib/server/http/answering';
import { templateWorkbook } from '$lib/server/services/material-import-template';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals }) => {
	await orError(async () => requireAct(signedIn(locals), 'readLaboratory'));
	return new Response(await templateWorkbook(), {
		headers: {
			'content-type': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
			'content-disposition': 'attachment; filename="materials-template.xlsx"'
		}
	});
};
