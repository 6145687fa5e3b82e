import { batchSheetInputSchema } from '$lib/schemas/compute';
import { computeEndpoint } from '$lib/server/http/compute-endpoint';
import { computeBatchSheet } from '$lib/server/services/compute-batch-sheet';
import type { RequestHandler } from './$types';

const answer = computeEndpoint(batchSheetInputSchema, computeBatchSheet);

export const POST: RequestHandler = ({ request }) => answer(request);
