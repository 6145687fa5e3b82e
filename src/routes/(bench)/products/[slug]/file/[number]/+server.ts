import { redirect } from '@sveltejs/kit';
import { versionNumberOf } from '$lib/schemas/version-number';
import { signedIn } from '$lib/server/access/signed-in';
import { orError } from '$lib/server/http/answering';
import { fileAddress } from '$lib/server/services/product-files';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals, params }) =>
	redirect(303, await orError(() => fileAddress(signedIn(locals), params.slug, versionNumberOf(params.number))));
