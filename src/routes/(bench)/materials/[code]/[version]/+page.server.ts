import { redirect } from '@sveltejs/kit';
import { materialDraftSchema, releaseMaterialSchema } from '$lib/schemas/material';
import { versionNumberOf } from '$lib/schemas/version-number';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { jsonAction } from '$lib/server/http/json-action';
import { draftMaterial, readMaterial, releaseMaterial, saveMaterialDraft } from '$lib/server/services/materials';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const view = await orError(() => readMaterial(actor, params.code, versionNumberOf(params.version)));
	return { ...view, mayEdit: may(actor, 'editMaterial') };
};

export const actions = {
	save: ({ request, locals, params }) =>
		jsonAction(request, materialDraftSchema, (draft) =>
			saveMaterialDraft(signedIn(locals), params.code, versionNumberOf(params.version), draft)
		),
	release: ({ request, locals, params }) =>
		jsonAction(request, releaseMaterialSchema, ({ rev, effectiveFrom }) =>
			releaseMaterial(signedIn(locals), params.code, versionNumberOf(params.version), rev, effectiveFrom)
		),
	draft: async ({ locals, params }) => {
		const answer = await answeringPlain(() => draftMaterial(signedIn(locals), params.code));
		if ('result' in answer) redirect(303, `/materials/${params.code}/${answer.result}`);
		return answer;
	}
} satisfies Actions;
