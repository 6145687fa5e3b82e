import { signedIn } from '$lib/server/access/signed-in';
import { requireAct } from '$lib/server/access/acts';
import { orError } from '$lib/server/http/answering';
import { csvResponse } from '$lib/server/http/csv';
import { templateRows } from '$lib/server/services/material-import-template';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals }) => {
	await orError(async () => requireAct(signedIn(locals), 'readLaboratory'));
	const [head = [], ...rows] = templateRows();
	return csvResponse('materials-template.csv', head, rows);
};
