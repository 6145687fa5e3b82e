import { computeInputSchema } from '$lib/schemas/compute';
import { computeEndpoint } from '$lib/server/http/compute-endpoint';
import { computeLists } from '$lib/server/services/compute-lists';
import type { RequestHandler } from './$types';

const answer = computeEndpoint(computeInputSchema, computeLists);

export const POST: RequestHandler = ({ request }) => answer(request);
