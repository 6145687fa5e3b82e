import { signedIn } from '$lib/server/http/signed-in';
import { readImpact } from '$lib/server/services/formula-impact';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = ({ locals, params }) =>
	signedIn(locals, async (actor) => Response.json(await readImpact(actor, params.code)));
