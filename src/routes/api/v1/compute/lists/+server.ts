import { computeEndpoint } from '$lib/server/http/compute-endpoint';
import { computeLists } from '$lib/server/services/compute';
import type { RequestHandler } from './$types';

const answer = computeEndpoint(computeLists);

export const POST: RequestHandler = ({ request }) => answer(request);
