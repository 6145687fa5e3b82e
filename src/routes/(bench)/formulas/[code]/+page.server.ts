import { redirect } from '@sveltejs/kit';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readFormula } from '$lib/server/services/formulas';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const { formula, version } = await orError(() => readFormula(signedIn(locals), params.code, null));
	redirect(303, `/formulas/${formula.code}/${version.number}`);
};
