import { error, fail } from '@sveltejs/kit';
import { z } from 'zod';
import { attachSchema, fileAddressSchema, pageQuerySchema } from '$lib/schemas/document';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { attachByAddress, detachDocument, readDocumentPage } from '$lib/server/services/documents';
import type { Actions, PageServerLoad } from './$types';

const idOf = (params: { readonly id: string }): string => {
	const address = fileAddressSchema.safeParse(params);
	return address.success ? address.data.id : error(404, { message: 'not-found', code: 'not-found' });
};

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const actor = signedIn(locals);
	const view = await orError(() => readDocumentPage(actor, idOf(params)));
	return { ...view, at: pageQuerySchema.parse(url.searchParams.get('page')), mayAttach: may(actor, 'attachDocument') };
};

const detachSchema = z.object({ linkId: z.uuid() });

export const actions = {
	attach: async ({ request, locals, params }) => {
		const sent = attachSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!sent.success) return fail(422, { refused: { code: 'invalid' as const, data: {} } });
		const { kind, address } = sent.data;
		return answeringPlain(() => attachByAddress(signedIn(locals), idOf(params), kind, address));
	},
	detach: async ({ request, locals }) => {
		const sent = detachSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!sent.success) return fail(422, { refused: { code: 'invalid' as const, data: {} } });
		return answeringPlain(() => detachDocument(signedIn(locals), sent.data.linkId, null));
	}
} satisfies Actions;
