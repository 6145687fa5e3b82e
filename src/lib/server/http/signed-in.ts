import type { z } from 'zod';
import type { Actor } from '../access/actor';
import { Refused } from '../refused';
import { orProblem, problem } from './answering';

/** For JSON routes of a signed-in person: without a session the answer is 401, and nothing of the route runs. */
export function signedIn(locals: App.Locals, fn: (actor: Actor) => Promise<Response>): Promise<Response> {
	const { actor } = locals;
	if (!actor) return Promise.resolve(problem(401, 'not-signed-in', 'Sign in first.'));
	return orProblem(() => fn(actor));
}

/** Parameters of an address; what does not fit their form leads nowhere. @throws Refused 'not-found'. */
export function addressOf<S extends z.ZodType>(params: unknown, schema: S): z.infer<S> {
	const parsed = schema.safeParse(params);
	if (!parsed.success) throw new Refused('not-found');
	return parsed.data;
}
