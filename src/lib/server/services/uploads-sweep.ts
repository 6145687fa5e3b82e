import { systemActor } from '../access/actor';
import { expiredUploads, knownUploads, removeUpload } from '../db/uploads';
import { withActor } from '../db/with-actor';
import { bucket } from '../storage/bucket';
import { discard } from './uploads';

const MOST_AT_ONCE = 100;
const PREFIX = 'upload/';
/** What is younger may still belong to somebody: an upload is opened before its row is written, and joined for its reading. */
const GRACE_MS = 2 * 60 * 60 * 1000;

/**
 * Removes what cut uploads left: rows past their time with their parts, and parts that never got a row.
 * Repeatable; what fails stays for the next time.
 */
export async function sweepUploads(now: Date): Promise<{ readonly uploads: number; readonly strays: number }> {
	const actor = systemActor('');
	const expired = await withActor(actor, (trx) => expiredUploads(trx, now, MOST_AT_ONCE));
	for (const upload of expired) {
		await discard(upload);
		await withActor(actor, (trx) => removeUpload(trx, upload.id));
	}
	return { uploads: expired.length, strays: await sweepStrays(now) };
}

async function sweepStrays(now: Date): Promise<number> {
	const isOld = (since: Date) => now.getTime() - since.getTime() > GRACE_MS;
	const open = (await bucket().unfinished(PREFIX)).filter(({ begun }) => isOld(begun));
	const ids = open.map(({ key }) => key.slice(PREFIX.length));
	const known = await withActor(systemActor(''), (trx) => knownUploads(trx, ids));
	const unknown = open.filter((_, index) => !known.has(ids[index] ?? ''));
	for (const { key, uploadId } of unknown) await bucket().abortParts(key, uploadId);
	// Joined parts whose removal failed after their content had been copied to its own place.
	const joined = (await bucket().list(PREFIX)).filter(({ written }) => isOld(written));
	for (const { key } of joined) await bucket().delete(key);
	return unknown.length + joined.length;
}
