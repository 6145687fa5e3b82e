import { z } from 'zod';
import { signedIn } from '$lib/server/http/signed-in';
import { readBulk } from '$lib/server/services/formulas';
import type { RequestHandler } from './$types';

const askedSchema = z.object({
	code: z.string().min(1).max(32),
	version: z.coerce.number().int().positive().nullable().catch(null)
});

export const GET: RequestHandler = ({ locals, url }) =>
	signedIn(locals, async (actor) => {
		const { code, version } = askedSchema.parse({
			code: (url.searchParams.get('code') ?? '').slice(0, 32) || '-',
			version: url.searchParams.get('version')
		});
		return Response.json(await readBulk(actor, code, version));
	});
