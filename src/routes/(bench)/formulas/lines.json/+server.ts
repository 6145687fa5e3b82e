import { signedIn } from '$lib/server/http/signed-in';
import { suggestLines } from '$lib/server/services/formulas';
import type { RequestHandler } from './$types';

const LONGEST_SEARCH = 100;

export const GET: RequestHandler = ({ locals, url }) =>
	signedIn(locals, async (actor) => {
		const text = (url.searchParams.get('q') ?? '').trim().slice(0, LONGEST_SEARCH);
		const code = (url.searchParams.get('for') ?? '').slice(0, LONGEST_SEARCH);
		return Response.json(text ? await suggestLines(actor, text, code) : []);
	});
