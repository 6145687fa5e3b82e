import { sql } from 'kysely';
import { handle } from '$lib/server/db/pool';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async () => {
	await sql`select 1`.execute(handle());
	return new Response('ok', { headers: { 'content-type': 'text/plain', 'cache-control': 'no-store' } });
};
