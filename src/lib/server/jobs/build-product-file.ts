import type PgBoss from 'pg-boss';
import { systemActor } from '../access/actor';
import { buildFile } from '../services/product-files';
import type { JobData } from './queue';
import { tellProgress } from './progress';

const QUEUE = 'build-product-file';
const WHOLE = 100;

/** Builds product files one at a time; a killed build is begun anew from what was frozen. */
export async function registerBuildProductFile(queue: PgBoss): Promise<void> {
	await queue.work<JobData[typeof QUEUE]>(QUEUE, { batchSize: 1 }, async ([job]) => {
		if (!job) return;
		const { jobId, productFileId, personId } = job.data;
		const actor = systemActor(personId);
		await tellProgress(actor, jobId, { state: 'running', done: 0, total: WHOLE });
		try {
			const resultSubject = await buildFile(actor, productFileId, (percent) => {
				// Told in passing: a lost report only makes the bar jump.
				void tellProgress(actor, jobId, { state: 'running', done: Math.min(WHOLE - 1, percent), total: WHOLE }).catch(
					() => undefined
				);
			});
			await tellProgress(actor, jobId, { state: 'done', done: WHOLE, total: WHOLE, resultSubject });
		} catch (error) {
			await tellProgress(actor, jobId, { state: 'failed', done: 0, total: WHOLE });
			throw error;
		}
	});
}
