import { CompiledQuery } from 'kysely';
import PgBoss from 'pg-boss';
import { config } from '../config';
import type { Actor } from '../access/actor';
import { newId } from '../db/id';
import type { Trx } from '../db/with-actor';

/** The queue's tables are made by the migrate command; the application role may not create any. */
export const QUEUE_SCHEMA = 'jobs';

export const QUEUES = [
	'build-product-file',
	'read-material-import',
	'commit-material-import',
	'mail',
	'sweep'
] as const;
export type QueueName = (typeof QUEUES)[number];

interface ImportJob {
	readonly jobId: string;
	readonly importId: string;
	readonly personId: string;
}
export interface JobData {
	readonly 'build-product-file': { readonly jobId: string; readonly productFileId: string; readonly personId: string };
	readonly 'read-material-import': ImportJob;
	readonly 'commit-material-import': ImportJob;
	readonly mail: { readonly mailId: string };
	readonly sweep: Record<string, never>;
}

let starting: Promise<PgBoss> | undefined;

export function startQueue(options: { readonly supervises: boolean }): Promise<PgBoss> {
	starting ??= (async () => {
		const boss = new PgBoss({
			connectionString: config().databaseUrl,
			schema: QUEUE_SCHEMA,
			migrate: false,
			supervise: options.supervises,
			schedule: options.supervises,
			max: 3
		});
		// Without a listener an error event ends the process.
		boss.on('error', (error) => console.error(JSON.stringify({ queue: error.message })));
		await boss.start();
		return boss;
	})();
	return starting;
}

export async function stopQueue(): Promise<void> {
	const boss = await starting;
	starting = undefined;
	await boss?.stop({ graceful: true, timeout: 5_000 });
}

/** Puts a job in the queue and its progress row beside it, in the transaction that causes it. */
export async function enqueue<Q extends QueueName>(
	trx: Trx,
	actor: Actor,
	queue: Q,
	subject: string,
	data: Omit<JobData[Q], 'jobId' | 'personId'>
): Promise<string> {
	const jobId = newId();
	await trx
		.insertInto('job_progress')
		.values({ job_id: jobId, kind: queue, subject, person_id: actor.personId, state: 'queued' })
		.execute();
	await put(trx, queue, { ...data, jobId, personId: actor.personId }, { id: jobId, retryLimit: 2 });
	return jobId;
}

const MAIL_TRIES = 12;

/** Puts a job in the queue that nobody watches, in the transaction that causes it. */
export const sendInTransaction = (trx: Trx, queue: 'mail', data: JobData['mail']): Promise<void> =>
	put(trx, queue, data, { retryLimit: MAIL_TRIES });

async function put(
	trx: Trx,
	queue: QueueName,
	data: object,
	options: { readonly id?: string; readonly retryLimit: number }
): Promise<void> {
	const boss = await startQueue({ supervises: false });
	await boss.send(queue, data, {
		...options,
		retryBackoff: true,
		expireInSeconds: 600,
		db: {
			executeSql: async (text: string, values: unknown[]) => {
				const result = await trx.executeQuery(CompiledQuery.raw(text, values));
				return { rows: [...result.rows], rowCount: result.rows.length };
			}
		}
	});
}
