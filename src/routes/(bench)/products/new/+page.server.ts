import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { productFormSchema, productOf } from '$lib/schemas/product-form';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, orError } from '$lib/server/http/answering';
import { createProduct, productChoices } from '$lib/server/services/products';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const choices = await orError(() => productChoices(signedIn(locals)));
	return { choices, form: await superValidate(zod4(productFormSchema)) };
};

export const actions = {
	default: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(productFormSchema));
		if (!form.valid) return fail(400, { form });
		const answer = await answering(form, () => createProduct(signedIn(locals), productOf(form.data)));
		if ('result' in answer) redirect(303, `/products/${answer.result}/list`);
		return answer;
	}
} satisfies Actions;
