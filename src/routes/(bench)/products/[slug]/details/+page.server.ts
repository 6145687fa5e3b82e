import { fail } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { packSchema } from '$lib/schemas/product';
import { assessorSchema, productDetailsSchema } from '$lib/schemas/product-details';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, answeringPlain, orError } from '$lib/server/http/answering';
import {
	addPack,
	assignAssessor,
	readProductDetails,
	saveProductDetails,
	withdrawAssessor
} from '$lib/server/services/product-details';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const view = await orError(() => readProductDetails(signedIn(locals), params.slug));
	const [detailsForm, packForm] = await Promise.all([
		superValidate(view.details, zod4(productDetailsSchema), { id: 'details' }),
		superValidate(zod4(packSchema), { id: 'pack' })
	]);
	return { ...view, detailsForm, packForm };
};

const withAssessor =
	(run: typeof assignAssessor) =>
	async ({ request, locals, params }: RequestEvent) => {
		const parsed = assessorSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!parsed.success) return fail(400, { refused: { code: 'invalid' as const, data: { field: 'personId' } } });
		return answeringPlain(() => run(signedIn(locals), params.slug, parsed.data.personId));
	};

export const actions = {
	save: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(productDetailsSchema), { id: 'details' });
		if (!form.valid) return fail(400, { form });
		return answering(form, () => saveProductDetails(signedIn(locals), params.slug, form.data));
	},
	addPack: async ({ request, locals, params }) => {
		const form = await superValidate(request, zod4(packSchema), { id: 'pack' });
		if (!form.valid) return fail(400, { form });
		return answering(form, () => addPack(signedIn(locals), params.slug, form.data));
	},
	assign: withAssessor(assignAssessor),
	withdraw: withAssessor(withdrawAssessor)
} satisfies Actions;
