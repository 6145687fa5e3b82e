import { sequence } from '@sveltejs/kit/hooks';
import { randomUUID } from 'node:crypto';
import type { HandleServerError, ServerInit } from '@sveltejs/kit';
import { closePool } from '$lib/server/db/pool';
import { requireMigrated } from '$lib/server/db/migrated';
import { languageAndTheme, requestId, securityHeaders, session, sideGate } from '$lib/server/http/handles';
import { stopQueue } from '$lib/server/jobs/queue';

export const init: ServerInit = async () => {
	await requireMigrated();
	process.once('sveltekit:shutdown', async () => {
		await stopQueue();
		await closePool();
	});
};

export const handle = sequence(requestId, securityHeaders, languageAndTheme, session, sideGate);

export const handleError: HandleServerError = ({ error, event, status }) => {
	if (status === 404) return { message: 'not-found', code: 'not-found' };
	const errorId = randomUUID();
	console.error(
		JSON.stringify({ errorId, requestId: event.locals.requestId, route: event.route.id, error: describe(error) })
	);
	return { message: 'broken', errorId };
};

const describe = (error: unknown) => (error instanceof Error ? (error.stack ?? error.message) : String(error));
