import { fail } from '@sveltejs/kit';
import { needDecisionSchema, shareSchema } from '$lib/schemas/file';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { decideNeed } from '$lib/server/services/file-readiness';
import { readFilePage, requestFile, shareFile } from '$lib/server/services/product-files';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, params }) => orError(() => readFilePage(signedIn(locals), params.slug));

const invalid = (field: string, reason: string) =>
	fail(400, { refused: { code: 'invalid' as const, data: { field } }, reason });

export const actions = {
	build: ({ locals, params }) => answeringPlain(() => requestFile(signedIn(locals), params.slug)),
	decide: async ({ request, locals, params }) => {
		const sent = Object.fromEntries(await request.formData());
		const parsed = needDecisionSchema.safeParse(sent);
		if (!parsed.success) return invalid('reason', String(sent['reason'] ?? ''));
		return answeringPlain(() => decideNeed(signedIn(locals), params.slug, parsed.data));
	},
	share: async ({ request, locals, params }) => {
		const sent = Object.fromEntries(await request.formData());
		const parsed = shareSchema.safeParse(sent);
		if (!parsed.success) return invalid('why', String(sent['why'] ?? ''));
		return answeringPlain(() => shareFile(signedIn(locals), params.slug, parsed.data.number, parsed.data.why));
	}
} satisfies Actions;
