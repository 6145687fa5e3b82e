import { fail } from '@sveltejs/kit';
import { clientApprovalSchema, sendBackSchema } from '$lib/schemas/label-copy';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { approveAsClient, sendBackCopy } from '$lib/server/services/copies';
import { readCounterProduct } from '$lib/server/services/counter';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = ({ locals, params }) =>
	orError(() => readCounterProduct(signedIn(locals), params.slug));

const invalid = (field: string) =>
	fail(422, { refused: { code: 'invalid' as const, data: { field } as Record<string, unknown> } });

export const actions = {
	approve: async ({ request, locals, params }) => {
		const input = clientApprovalSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!input.success) return invalid('copyId');
		const { copyId, contentHash } = input.data;
		return answeringPlain(async () => {
			await approveAsClient(signedIn(locals), params.slug, copyId, contentHash);
			return 'approved' as const;
		});
	},
	sendBack: async ({ request, locals, params }) => {
		const input = sendBackSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!input.success) return invalid('comment');
		const { copyId, comment } = input.data;
		return answeringPlain(async () => {
			await sendBackCopy(signedIn(locals), params.slug, copyId, comment);
			return 'sentBack' as const;
		});
	}
} satisfies Actions;
