import type PgBoss from 'pg-boss';
import { deliverMail } from '../mail/outbox';
import type { JobData } from './queue';

/** Mails leave one after another; what fails is tried again by the queue. */
export async function registerMail(queue: PgBoss): Promise<void> {
	await queue.work<JobData['mail']>('mail', async (jobs) => {
		for (const { data } of jobs) await deliverMail(data.mailId);
	});
}
