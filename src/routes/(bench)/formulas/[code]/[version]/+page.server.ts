import { fail, redirect } from '@sveltejs/kit';
import { z } from 'zod';
import { formulaDraftSchema } from '$lib/schemas/formula';
import { trialNumberSchema, trialSchema } from '$lib/schemas/trial';
import { versionNumberOf } from '$lib/schemas/version-number';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { jsonAction } from '$lib/server/http/json-action';
import { draftFormula, readFormula, releaseFormula, saveFormulaDraft } from '$lib/server/services/formulas';
import { continueTrial, recordTrial } from '$lib/server/services/trials';
import type { Actions, PageServerLoad } from './$types';

const revSchema = z.object({ rev: z.number().int().positive() });

export const load: PageServerLoad = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const view = await orError(() => readFormula(actor, params.code, versionNumberOf(params.version)));
	return { ...view, mayEdit: may(actor, 'editFormula') };
};

export const actions = {
	save: ({ request, locals, params }) =>
		jsonAction(request, formulaDraftSchema, (draft) =>
			saveFormulaDraft(signedIn(locals), params.code, versionNumberOf(params.version), draft)
		),
	release: ({ request, locals, params }) =>
		jsonAction(request, revSchema, ({ rev }) =>
			releaseFormula(signedIn(locals), params.code, versionNumberOf(params.version), rev)
		),
	trial: async ({ request, locals, params }) => {
		const sent = Object.fromEntries(await request.formData()) as Record<string, string>;
		const parsed = trialSchema.safeParse(sent);
		if (!parsed.success) {
			const field = String(parsed.error.issues[0]?.path[0] ?? '');
			return fail(400, { trial: { field, typed: sent } });
		}
		const number = versionNumberOf(params.version) ?? 1;
		return answeringPlain(() => recordTrial(signedIn(locals), params.code, number, parsed.data));
	},
	continueTrial: async ({ request, locals, params }) => {
		const parsed = trialNumberSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!parsed.success) return fail(400, { trial: { field: 'number', typed: {} } });
		const answer = await answeringPlain(() => continueTrial(signedIn(locals), params.code, parsed.data.number));
		if ('result' in answer) redirect(303, `/formulas/${params.code}/${answer.result}`);
		return answer;
	},
	draft: async ({ locals, params }) => {
		const answer = await answeringPlain(() => draftFormula(signedIn(locals), params.code));
		if ('result' in answer) redirect(303, `/formulas/${params.code}/${answer.result}`);
		return answer;
	}
} satisfies Actions;
