import { fail } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { listQueryOf } from '$lib/schemas/paging';
import { clientSchema, inviteSchema, personSchema } from '$lib/schemas/person';
import { signedIn } from '$lib/server/access/signed-in';
import { answering, answeringPlain, orError } from '$lib/server/http/answering';
import { addClient, addPerson, mailLink, readPeople } from '$lib/server/services/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const query = listQueryOf(url.searchParams);
	const view = await orError(() => readPeople(signedIn(locals), query));
	const [personForm, clientForm] = await Promise.all([
		superValidate(zod4(personSchema)),
		superValidate(zod4(clientSchema))
	]);
	return { ...view, query, personForm, clientForm };
};

export const actions = {
	addPerson: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(personSchema));
		if (!form.valid) return fail(400, { form });
		return answering(form, () => addPerson(signedIn(locals), form.data));
	},
	mailLink: async ({ request, locals }) => {
		const parsed = inviteSchema.safeParse(Object.fromEntries(await request.formData()));
		if (!parsed.success) return fail(400, { refused: { code: 'invalid' as const, data: { field: 'personId' } } });
		return answeringPlain(() => mailLink(signedIn(locals), parsed.data.personId));
	},
	addClient: async ({ request, locals }) => {
		const form = await superValidate(request, zod4(clientSchema));
		if (!form.valid) return fail(400, { form });
		return answering(form, () => addClient(signedIn(locals), form.data.clientName));
	}
} satisfies Actions;
