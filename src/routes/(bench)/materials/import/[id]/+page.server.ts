import { z } from 'zod';
import { commitImportSchema, importFilterSchema, IMPORT_COLUMNS, mendSchema } from '$lib/schemas/material-import';
import { may } from '$lib/server/access/acts';
import { signedIn } from '$lib/server/access/signed-in';
import { answeringPlain, orError } from '$lib/server/http/answering';
import { Refused } from '$lib/server/refused';
import { commitImport, discardImport, mendRow, readImport } from '$lib/server/services/material-imports';
import type { Actions, PageServerLoad } from './$types';

const addressSchema = z.uuid();
const idOf = (text: string): string => {
	const id = addressSchema.safeParse(text);
	if (!id.success) throw new Refused('not-found');
	return id.data;
};

export const load: PageServerLoad = async ({ locals, params, url }) => {
	const actor = signedIn(locals);
	const filter = importFilterSchema.parse({
		show: url.searchParams.get('show'),
		page: url.searchParams.get('page') ?? 1
	});
	const view = await orError(async () => readImport(actor, idOf(params.id), filter));
	return { ...view, mayEdit: may(actor, 'editMaterial') };
};

/** The cells of a row come one by one, so that a row can be mended without script. */
function mendOf(form: FormData): unknown {
	const sent = IMPORT_COLUMNS.flatMap((column) => {
		const text = form.get(column);
		return typeof text === 'string' ? [[column, text] as const] : [];
	});
	return { number: form.get('number'), cells: Object.fromEntries(sent) };
}

export const actions = {
	mend: async ({ request, locals, params }) => {
		const sent = mendSchema.safeParse(mendOf(await request.formData()));
		return answeringPlain(async () => {
			if (!sent.success) throw new Refused('invalid');
			await mendRow(signedIn(locals), idOf(params.id), sent.data);
		});
	},
	commit: async ({ request, locals, params }) => {
		const sent = commitImportSchema.safeParse(Object.fromEntries(await request.formData()));
		return answeringPlain(async () => {
			if (!sent.success) throw new Refused('invalid', { field: 'effectiveFrom' });
			await commitImport(signedIn(locals), idOf(params.id), sent.data);
		});
	},
	discard: ({ locals, params }) => answeringPlain(async () => discardImport(signedIn(locals), idOf(params.id)))
} satisfies Actions;
