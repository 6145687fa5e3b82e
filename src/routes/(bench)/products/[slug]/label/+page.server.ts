import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import type { z } from 'zod';
import {
	copyDraftSchema,
	draftOf,
	firstBatchSchema,
	labelQuerySchema,
	newCopySchema,
	reasonSchema,
	sendBackSchema
} from '$lib/schemas/label-copy';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, answeringPlain, orError } from '$lib/server/http/answering';
import {
	approveForLaboratory,
	createCopy,
	putCopyInUse,
	saveCopy,
	sendBackCopy,
	submitCopy
} from '$lib/server/services/copies';
import { readLabelPage } from '$lib/server/services/copy-views';
import { paths } from '$lib/ui/paths';
import type { Actions, PageServerLoad } from './$types';

const queryOf = (url: URL) =>
	labelQuerySchema.parse({
		pack: url.searchParams.get('pack'),
		market: url.searchParams.get('market'),
		copy: url.searchParams.get('copy')
	});

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const actor = signedIn(locals);
	const page = await orError(() => readLabelPage(actor, params.slug, queryOf(url)));
	const mayEdit = may(actor, 'editCopy');
	const { copy } = page;
	const editable = mayEdit && copy?.state === 'draft';
	return {
		...page,
		mayEdit,
		form: editable
			? await superValidate(draftOf(copy.rev, copy.content), zod4(copyDraftSchema), { errors: false })
			: null
	};
};

const invalid = (error: z.ZodError) =>
	fail(422, {
		refused: {
			code: 'invalid' as const,
			data: { field: error.issues[0]?.path.join('.') ?? '' } as Record<string, unknown>
		}
	});
const sent = async <S extends z.ZodType>(request: Request, schema: S) =>
	schema.safeParse(Object.fromEntries(await request.formData()));

export const actions = {
	begin: async ({ request, locals, params }) => {
		const input = await sent(request, newCopySchema);
		if (!input.success) return invalid(input.error);
		const answer = await answeringPlain(() =>
			createCopy(signedIn(locals), params.slug, input.data.packId, input.data.market)
		);
		if ('result' in answer) redirect(303, paths.label(params.slug, { copy: answer.result }));
		return answer;
	},
	save: async ({ request, locals, params, url }) => {
		const form = await superValidate(request, zod4(copyDraftSchema));
		const copyId = queryOf(url).copy;
		if (!form.valid || copyId === null) return fail(400, { form });
		const answer = await answering(form, () => saveCopy(signedIn(locals), params.slug, copyId, form.data));
		if ('result' in answer) form.data.rev = answer.result;
		return answer;
	},
	submit: async ({ request, locals, params }) => {
		const input = await sent(request, reasonSchema);
		if (!input.success) return invalid(input.error);
		return answeringPlain(() => submitCopy(signedIn(locals), params.slug, input.data.copyId, input.data.reason));
	},
	approve: async ({ request, locals, params }) => {
		const input = await sent(request, reasonSchema);
		if (!input.success) return invalid(input.error);
		return answeringPlain(() =>
			approveForLaboratory(signedIn(locals), params.slug, input.data.copyId, input.data.reason)
		);
	},
	sendBack: async ({ request, locals, params }) => {
		const input = await sent(request, sendBackSchema);
		if (!input.success) return invalid(input.error);
		const answer = await answeringPlain(() =>
			sendBackCopy(signedIn(locals), params.slug, input.data.copyId, input.data.comment)
		);
		if ('result' in answer) redirect(303, paths.label(params.slug, { copy: answer.result }));
		return answer;
	},
	use: async ({ request, locals, params }) => {
		const input = await sent(request, firstBatchSchema);
		if (!input.success) return invalid(input.error);
		return answeringPlain(() => putCopyInUse(signedIn(locals), params.slug, input.data));
	}
} satisfies Actions;
