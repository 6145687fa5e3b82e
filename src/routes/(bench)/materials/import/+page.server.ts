import { redirect } from '@sveltejs/kit';
import { beginImportSchema } from '$lib/schemas/material-import';
import { listQueryOf } from '$lib/schemas/paging';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { Refused } from '$lib/server/refused';
import { beginImport, readImports } from '$lib/server/services/material-imports';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const actor = signedIn(locals);
	const { page } = listQueryOf(url.searchParams);
	return { imports: await orError(() => readImports(actor, page)), mayEdit: may(actor, 'editMaterial') };
};

export const actions = {
	begin: async ({ request, locals }) => {
		const sent = beginImportSchema.safeParse(Object.fromEntries(await request.formData()));
		const answer = await answeringPlain(async () => {
			if (!sent.success) throw new Refused('invalid', { field: 'documentId' });
			return beginImport(signedIn(locals), sent.data.documentId);
		});
		if ('result' in answer) redirect(303, `/materials/import/${answer.result}`);
		return answer;
	}
} satisfies Actions;
