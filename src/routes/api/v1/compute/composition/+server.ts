import { computeInputSchema } from '$lib/schemas/compute';
import { computeEndpoint } from '$lib/server/http/compute-endpoint';
import { computeComposition } from '$lib/server/services/compute';
import type { RequestHandler } from './$types';

const answer = computeEndpoint(computeInputSchema, computeComposition);

export const POST: RequestHandler = ({ request }) => answer(request);
