import { answers } from '$lib/server/db/migrated';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async () => {
	await answers();
	return new Response('ok', { headers: { 'content-type': 'text/plain', 'cache-control': 'no-store' } });
};
