import { tokenRequestSchema } from '$lib/schemas/compute';
import { issueToken } from '$lib/server/auth/tokens';
import { orProblem } from '$lib/server/http/answering';
import { jsonBody } from '$lib/server/http/json-body';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = ({ request, getClientAddress }) =>
	orProblem(async () => {
		const credentials = await jsonBody(request, tokenRequestSchema);
		return Response.json(await issueToken(credentials, getClientAddress(), new Date()));
	});
