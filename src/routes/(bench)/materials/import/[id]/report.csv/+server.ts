import { IMPORT_COLUMNS } from '$lib/schemas/material-import';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { csvResponse } from '$lib/server/http/csv';
import { allImportRows } from '$lib/server/services/material-imports';
import { textFor } from '$lib/ui/text';
import type { RequestHandler } from './$types';

/** The sheet as it was read and mended, with what is wrong beside each row; it can be mended and imported again. */
export const GET: RequestHandler = async ({ locals, params }) => {
	const { rows } = await orError(() => allImportRows(signedIn(locals), params.id));
	const t = textFor('en');
	return csvResponse(
		'import-report.csv',
		['row', 'remarks', ...IMPORT_COLUMNS],
		rows.map(({ number, cells, faults }) => [
			number,
			faults.map((fault) => t.materialImport.fault(fault)).join(' '),
			...IMPORT_COLUMNS.map((column) => cells[column] ?? '')
		])
	);
};
