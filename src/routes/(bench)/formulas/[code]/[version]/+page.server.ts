import { redirect } from '@sveltejs/kit';
import { z } from 'zod';
import { formulaDraftSchema } from '$lib/schemas/formula';
import { versionNumberOf } from '$lib/schemas/version-number';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { jsonAction } from '$lib/server/http/json-action';
import { draftFormula, readFormula, releaseFormula, saveFormulaDraft } from '$lib/server/services/formulas';
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
	draft: async ({ locals, params }) => {
		const answer = await answeringPlain(() => draftFormula(signedIn(locals), params.code));
		if ('result' in answer) redirect(303, `/formulas/${params.code}/${answer.result}`);
		return answer;
	}
} satisfies Actions;
