import { listQueryOf } from '$lib/schemas/paging';
import { signedIn } from '$lib/server/access/signed-in';
import { csvResponse } from '$lib/server/http/csv';
import { allMaterials } from '$lib/server/services/materials';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals, url }) => {
	const query = { ...listQueryOf(url.searchParams), supplier: url.searchParams.get('supplier') ?? '' };
	const rows = await allMaterials(signedIn(locals), query);
	return csvResponse(
		'materials.csv',
		[
			'code',
			'trade name',
			'supplier',
			'version',
			'draft',
			'contains',
			'used in formulas',
			'constituents',
			'documented'
		],
		rows.map((row) => [
			row.code,
			row.tradeName,
			row.supplier,
			row.released,
			row.draft,
			row.contains.join('; '),
			row.usedIn,
			row.constituents,
			row.documented
		])
	);
};
