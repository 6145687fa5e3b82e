import { fail, type ActionFailure } from '@sveltejs/kit';
import type { z } from 'zod';
import { answersSchema, claimIdSchema, evidenceLinkSchema, evidenceSchema, newClaimSchema } from '$lib/schemas/claim';
import type { Actor } from '$lib/server/access/actor';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError, type RefusedAction } from '$lib/server/http/answering';
import {
	addClaim,
	answerClaim,
	linkEvidence,
	readClaims,
	unlinkEvidence,
	withdrawClaim
} from '$lib/server/services/claims';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

export const load: PageServerLoad = ({ locals, params }) => orError(() => readClaims(signedIn(locals), params.slug));

type Typed = Record<string, string>;

/** Parse, one service, answer; what was typed goes back with a refusal. */
const action =
	<S extends z.ZodType, T>(schema: S, run: (actor: Actor, slug: string, input: z.infer<S>) => Promise<T>) =>
	async ({
		request,
		locals,
		params
	}: RequestEvent): Promise<{ result: T } | ActionFailure<RefusedAction & { typed: Typed }>> => {
		const typed = Object.fromEntries(await request.formData()) as Typed;
		const parsed = schema.safeParse(typed);
		if (!parsed.success) {
			const field = String(parsed.error.issues[0]?.path[0] ?? '');
			return fail(400, { refused: { code: 'invalid' as const, data: { field } }, typed });
		}
		const answer = await answeringPlain(() => run(signedIn(locals), params.slug, parsed.data));
		return 'result' in answer ? answer : fail(answer.status, { ...answer.data, typed });
	};

export const actions = {
	add: action(newClaimSchema, addClaim),
	answer: action(answersSchema, answerClaim),
	link: action(evidenceSchema, linkEvidence),
	unlink: action(evidenceLinkSchema, (actor, slug, { linkId }) => unlinkEvidence(actor, slug, linkId)),
	withdraw: action(claimIdSchema, (actor, slug, { claimId }) => withdrawClaim(actor, slug, claimId))
} satisfies Actions;
