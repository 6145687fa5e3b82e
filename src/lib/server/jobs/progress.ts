import { requireRole, type Actor } from '../access/actor';
import { withActor } from '../db/with-actor';
import { Refused } from '../refused';

export interface Progress {
	readonly state: 'running' | 'done' | 'failed';
	readonly done: number;
	readonly total: number;
	readonly resultSubject?: string;
}

/** What a job has done so far, for the page that waits for it. A finished job is not set back by a late report. */
export const tellProgress = (actor: Actor, jobId: string, progress: Progress): Promise<void> =>
	withActor(actor, async (trx) => {
		await trx
			.updateTable('job_progress')
			.set({
				state: progress.state,
				done: progress.done,
				total: progress.total,
				result_subject: progress.resultSubject ?? null,
				updated_at: new Date()
			})
			.where('job_id', '=', jobId)
			.where('state', '<>', 'done')
			.execute();
	});

export interface JobView {
	readonly state: 'waiting' | 'running' | 'done' | 'failed';
	readonly done: number;
	readonly total: number;
	readonly note: string | null;
	readonly resultHref: string | null;
}

/** @throws Refused 'not-found', also for another person's job. */
export function readJob(actor: Actor, jobId: string): Promise<JobView> {
	requireRole(actor, 'officer', 'formulator', 'assessor', 'administrator', 'client');
	return withActor(actor, async (trx) => {
		const row = await trx.selectFrom('job_progress').selectAll().where('job_id', '=', jobId).executeTakeFirst();
		if (!row) throw new Refused('not-found');
		return {
			state: row.state === 'queued' ? 'waiting' : row.state,
			done: row.done,
			total: row.total,
			note: row.note || null,
			resultHref: row.result_subject
		};
	});
}
