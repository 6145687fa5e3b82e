import type PgBoss from 'pg-boss';
import { systemActor, type Actor } from '../access/actor';
import { commitMaterialImport, readMaterialImport, type OnProgress } from '../services/material-import-run';
import { tellProgress } from './progress';
import type { JobData } from './queue';

type Queue = 'read-material-import' | 'commit-material-import';
const WORK: Record<Queue, (actor: Actor, id: string, onprogress: OnProgress) => Promise<void>> = {
	'read-material-import': readMaterialImport,
	'commit-material-import': commitMaterialImport
};

/** Reads and makes imports of materials, one at a time; a killed one is begun anew and leaves nothing half made. */
export async function registerMaterialImports(queue: PgBoss): Promise<void> {
	for (const name of Object.keys(WORK) as Queue[]) {
		await queue.work<JobData[Queue]>(name, { batchSize: 1 }, async ([job]) => {
			if (job) await run(name, job.data);
		});
	}
}

async function run(name: Queue, { jobId, importId, personId }: JobData[Queue]): Promise<void> {
	const actor = systemActor(personId);
	const resultSubject = `/materials/import/${importId}`;
	await tellProgress(actor, jobId, { state: 'running', done: 0, total: 1 });
	try {
		await WORK[name](actor, importId, (done, total) => {
			// Told in passing: a lost report only makes the bar jump.
			void tellProgress(actor, jobId, { state: 'running', done, total }).catch(() => undefined);
		});
		await tellProgress(actor, jobId, { state: 'done', done: 1, total: 1, resultSubject });
	} catch (error) {
		await tellProgress(actor, jobId, { state: 'failed', done: 0, total: 1 });
		throw error;
	}
}
