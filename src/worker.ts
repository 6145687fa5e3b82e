import { closePool } from '$lib/server/db/pool';
import { requireMigrated } from '$lib/server/db/migrated';
import { registerBuildProductFile } from '$lib/server/jobs/build-product-file';
import { registerMail } from '$lib/server/jobs/mail';
import { registerMaterialImports } from '$lib/server/jobs/material-imports';
import { registerSweep } from '$lib/server/jobs/sweep';
import { startQueue, stopQueue } from '$lib/server/jobs/queue';
import { closeBucket } from '$lib/server/storage/bucket';

/** The second entry of the application: the queue's jobs, away from every request. */
async function start(): Promise<void> {
	await requireMigrated();
	const queue = await startQueue({ supervises: true });
	await registerBuildProductFile(queue);
	await registerMaterialImports(queue);
	await registerMail(queue);
	await registerSweep(queue);
	console.log(JSON.stringify({ worker: 'ready' }));
}

async function stop(): Promise<void> {
	await stopQueue();
	closeBucket();
	await closePool();
	process.exit(0);
}

process.once('SIGTERM', () => void stop());
process.once('SIGINT', () => void stop());

start().catch((error: unknown) => {
	console.error(error);
	process.exit(1);
});
