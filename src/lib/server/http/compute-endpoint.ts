import type { z } from 'zod';
import { requireAct } from '../access/acts';
import { orProblem } from './answering';
import { bearerActor } from './bearer';
import { jsonBody } from './json-body';

/** One compute endpoint: token, role, body, core, answer. */
export const computeEndpoint =
	<S extends z.ZodType>(schema: S, compute: (input: z.infer<S>) => object) =>
	(request: Request) =>
		orProblem(async () => {
			const actor = await bearerActor(request, new Date());
			if (actor instanceof Response) return actor;
			requireAct(actor, 'readLaboratory');
			return Response.json(compute(await jsonBody(request, schema)));
		});
