import type PgBoss from 'pg-boss';
import { sweepAttempts } from '../auth/attempts';
import { sweepSessions } from '../auth/sessions';
import { sweepMails } from '../mail/outbox';
import { today } from '../clock';
import { moveDueVersions } from '../services/due-versions';
import { sweepUploads } from '../services/uploads-sweep';
import type { QueueName } from './queue';

const SWEEP: QueueName = 'sweep';
const EVERY_QUARTER_HOUR = '*/15 * * * *';
/** Longer than the longest window of a limit. */
const ATTEMPTS_KEPT_MS = 24 * 60 * 60 * 1000;

/**
 * Throws away what nobody finished (uploads, sessions, counted attempts), sends mails that are overdue and carries material
 * versions whose day has come to the products. Safe to run twice.
 */
export async function registerSweep(queue: PgBoss): Promise<void> {
	await queue.work(SWEEP, async () => {
		const now = new Date();
		await sweepUploads(now);
		await sweepSessions();
		await sweepMails(now);
		await moveDueVersions(today());
		await sweepAttempts(new Date(now.getTime() - ATTEMPTS_KEPT_MS));
	});
	await queue.schedule(SWEEP, EVERY_QUARTER_HOUR);
}
