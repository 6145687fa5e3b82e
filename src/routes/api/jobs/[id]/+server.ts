import { z } from 'zod';
import { addressOf, signedIn } from '$lib/server/http/signed-in';
import { readJob } from '$lib/server/jobs/progress';
import type { RequestHandler } from './$types';

const jobSchema = z.object({ id: z.uuid() });

export const GET: RequestHandler = ({ locals, params }) =>
	signedIn(locals, async (actor) => Response.json(await readJob(actor, addressOf(params, jobSchema).id)));
