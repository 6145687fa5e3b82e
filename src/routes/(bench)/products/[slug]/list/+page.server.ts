import { fail } from '@sveltejs/kit';
import { arrangementSchema, carryOverSchema } from '$lib/schemas/list-decision';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { batchDayOf, marketOf } from '$lib/server/http/batch-day';
import { jsonAction } from '$lib/server/http/json-action';
import { arrangeList, decideCarryOver } from '$lib/server/services/list-decisions';
import { readProductList } from '$lib/server/services/product-list';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const actor = signedIn(locals);
	const batchDay = batchDayOf(url);
	const market = marketOf(url);
	const view = await orError(() => readProductList(actor, params.slug, batchDay, market));
	return { batchDay, market, mayDecide: may(actor, 'editProduct'), ...view };
};

export const actions = {
	arrange: ({ request, locals, params }) =>
		jsonAction(request, arrangementSchema, (input) => arrangeList(signedIn(locals), params.slug, input)),
	carryOver: async ({ request, locals, params }) => {
		const sent = Object.fromEntries(await request.formData());
		const parsed = carryOverSchema.safeParse(sent);
		if (!parsed.success) return fail(400, { refused: { code: 'invalid' as const, data: { field: 'reason' } } });
		return answeringPlain(() => decideCarryOver(signedIn(locals), params.slug, parsed.data));
	}
} satisfies Actions;
