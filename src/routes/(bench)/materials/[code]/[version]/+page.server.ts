import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { materialDraftSchema, releaseMaterialSchema } from '$lib/schemas/material';
import { answerSchema, useLimitSchema, withdrawLimitSchema } from '$lib/schemas/material-answers';
import { versionNumberOf } from '$lib/schemas/version-number';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, answeringPlain, orError } from '$lib/server/http/answering';
import { jsonAction } from '$lib/server/http/json-action';
import { addUseLimit, recordAnswer, withdrawUseLimit } from '$lib/server/services/material-answers';
import { draftMaterial, readMaterial, releaseMaterial, saveMaterialDraft } from '$lib/server/services/materials';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const actor = signedIn(locals);
	const view = await orError(() => readMaterial(actor, params.code, versionNumberOf(params.version)));
	const [answerForm, limitForm] = await Promise.all([
		superValidate(zod4(answerSchema), { id: 'answer' }),
		superValidate(zod4(useLimitSchema), { id: 'limit' })
	]);
	return { ...view, answerForm, limitForm, mayEdit: may(actor, 'editMaterial') };
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
	answer: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(answerSchema), { id: 'answer' });
		if (!form.valid) return fail(400, { form });
		return answering(form, () =>
			recordAnswer(signedIn(locals), params.code, versionNumberOf(params.version), form.data)
		);
	},
	limit: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(useLimitSchema), { id: 'limit' });
		if (!form.valid) return fail(400, { form });
		return answering(form, () => addUseLimit(signedIn(locals), params.code, form.data));
	},
	withdrawLimit: async ({ request, locals, params }) => {
		const sent = withdrawLimitSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!sent.success) return fail(422, { refused: { code: 'invalid' as const, data: { field: 'reason' } } });
		return answeringPlain(() => withdrawUseLimit(signedIn(locals), params.code, sent.data.id, sent.data.reason));
	},
	draft: async ({ locals, params }) => {
		const answer = await answeringPlain(() => draftMaterial(signedIn(locals), params.code));
		if ('result' in answer) redirect(303, `/materials/${params.code}/${answer.result}`);
		return answer;
	}
} satisfies Actions;
