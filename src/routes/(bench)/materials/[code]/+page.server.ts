import { redirect } from '@sveltejs/kit';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { readMaterial } from '$lib/server/services/materials';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const { material, version } = await orError(() => readMaterial(signedIn(locals), params.code, null));
	redirect(303, `/materials/${material.code}/${version.number}`);
};
