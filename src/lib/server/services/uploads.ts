import type { DocumentDetails } from '$lib/schemas/document';
import type { UploadBegin } from '$lib/schemas/upload';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { fileFacts, keepFile, type FileFacts } from '../db/documents';
import { newId } from '../db/id';
import {
	insertUpload,
	lockUpload,
	removeUpload,
	saveParts,
	saveState,
	uploadById,
	type UploadRow
} from '../db/uploads';
import { withActor } from '../db/with-actor';
import { Refused } from '../refused';
import { bucket } from '../storage/bucket';
import { uploadKey } from '../storage/keys';
import { cleanFileName, judgeAnnounced, PART_BYTES, partBytes, partCount } from '../storage/upload-rules';
import { fileDocument, remarksOn, type FileRemarks } from './documents';
import { takeIn } from './uploads-intake';

const HOUR_MS = 60 * 60 * 1000;
/** An upload nobody has touched for so long is swept. */
const IDLE_HOURS = 24;
/** Completing takes seconds; one that is older has lost its process. */
const COMPLETING_HOURS = 1;

const inHours = (hours: number): Date => new Date(Date.now() + hours * HOUR_MS);

export interface BegunUpload {
	readonly id: string;
	readonly name: string;
	readonly partBytes: number;
	readonly parts: number;
}

/** Judges a file by name and size and opens an upload for it. @throws Refused before its first byte travels. */
export async function beginUpload(actor: Actor, { name, bytes, purpose }: UploadBegin): Promise<BegunUpload> {
	requireAct(actor, 'attachDocument');
	const kept = cleanFileName(name);
	const refusal = judgeAnnounced(kept, bytes);
	if (refusal) throw new Refused(refusal.code, refusal.data);
	const id = newId<'upload'>();
	const s3UploadId = await bucket().beginParts(uploadKey(id));
	const row = { id, personId: actor.personId, purpose, name: kept, bytes, s3UploadId, expiresAt: inHours(IDLE_HOURS) };
	try {
		await withActor(actor, (trx) => insertUpload(trx, row));
	} catch (error) {
		await bucket().abortParts(uploadKey(id), s3UploadId);
		throw error;
	}
	return { id, name: kept, partBytes: PART_BYTES, parts: partCount(bytes) };
}

const broken = (upload: UploadRow, data: Record<string, unknown>) =>
	new Refused('upload-broken', { name: upload.name, ...data });

function requireReceiving(upload: UploadRow): void {
	if (upload.state !== 'receiving') throw new Refused('wrong-state', { name: upload.name, state: upload.state });
}

/** Reads one part whole; nothing of it is sent on unless it has exactly the bytes it must have. */
async function readPart(
	body: AsyncIterable<Uint8Array>,
	wanted: number
): Promise<Uint8Array | { readonly got: number }> {
	const part = Buffer.allocUnsafe(wanted);
	let got = 0;
	try {
		for await (const piece of body) {
			if (got + piece.length > wanted) return { got: got + piece.length };
			part.set(piece, got);
			got += piece.length;
		}
	} catch {
		// The line was cut: nothing of the part has gone on.
		return { got };
	}
	return got === wanted ? part : { got };
}

/** Takes one part, in any order; sending one again replaces it. */
export async function putPart(
	actor: Actor,
	id: string,
	number: number,
	body: AsyncIterable<Uint8Array>
): Promise<{ readonly number: number; readonly bytes: number }> {
	requireAct(actor, 'attachDocument');
	const upload = await withActor(actor, (trx) => uploadById(trx, id));
	requireReceiving(upload);
	const wanted = partBytes(upload.expectedBytes, number);
	if (wanted === null) throw broken(upload, { part: number, limit: partCount(upload.expectedBytes) });
	const part = await readPart(body, wanted);
	if (!(part instanceof Uint8Array)) throw broken(upload, { part: number, bytes: part.got, limit: wanted });
	const stored = await bucket().putPart(uploadKey(id), upload.s3UploadId, number, part);
	if (!stored) throw broken(upload, { part: number });
	await withActor(actor, async (trx) => {
		const now = await lockUpload(trx, id);
		requireReceiving(now);
		const others = now.parts.filter((each) => each.number !== number);
		await saveParts(trx, id, [...others, { ...stored, bytes: wanted }], inHours(IDLE_HOURS));
	});
	return { number, bytes: wanted };
}

export interface FinishedUpload extends FileFacts, FileRemarks {
	readonly uploadId: string;
	readonly name: string;
	/** Null when the document's form comes later. */
	readonly documentId: string | null;
}

/** Closes the upload to further parts; only one call may go on from here. */
const claim = (actor: Actor, id: string): Promise<UploadRow> =>
	withActor(actor, async (trx) => {
		const upload = await lockUpload(trx, id);
		if (upload.state === 'done') return upload;
		requireReceiving(upload);
		const have = new Set(upload.parts.map((part) => part.number));
		const numbers = Array.from({ length: partCount(upload.expectedBytes) }, (_, index) => index + 1);
		const missing = numbers.filter((number) => !have.has(number));
		if (missing.length > 0) throw broken(upload, { missing });
		await saveState(trx, id, 'completing', { expiresAt: inHours(COMPLETING_HOURS) });
		return upload;
	});

const finished = (upload: UploadRow, facts: FileFacts, documentId: string | null): FinishedUpload => ({
	...facts,
	...remarksOn(facts, upload.name),
	uploadId: upload.id,
	name: upload.name,
	documentId
});

/**
 * Puts the parts together, reads the content once, keeps it under its hash and writes what is known of it, with the
 * document if its details are given. Whatever fails, nothing is left behind. Asked again, it answers the same.
 */
export async function completeUpload(
	actor: Actor,
	id: string,
	details: DocumentDetails | null = null
): Promise<FinishedUpload> {
	requireAct(actor, 'attachDocument');
	const upload = await claim(actor, id);
	if (upload.state === 'done' && upload.sha256 !== null) {
		const { sha256 } = upload;
		return withActor(actor, async (trx) => finished(upload, await fileFacts(trx, sha256), null));
	}
	try {
		const facts = await takeIn(bucket(), upload);
		return await withActor(actor, async (trx) => {
			const kept = await keepFile(trx, facts, actor.personId);
			await saveState(trx, id, 'done', { sha256: kept.sha256 });
			const file = { sha256: kept.sha256, fileName: upload.name };
			return finished(upload, kept, details && (await fileDocument(trx, actor, file, details)));
		});
	} catch (error) {
		await withActor(actor, (trx) => saveState(trx, id, 'abandoned'));
		throw error;
	} finally {
		// What cannot be removed now is swept later; it must not hide how the upload itself ended.
		await discard(upload).catch(() => undefined);
	}
}

/** Everything the bucket holds for an upload outside its content's own place. Repeating it is no error. */
export async function discard(upload: UploadRow): Promise<void> {
	const key = uploadKey(upload.id);
	await bucket().abortParts(key, upload.s3UploadId);
	await bucket().delete(key);
}

/** Gives an upload up; what was sent of it goes at once. One that is finished stays. */
export async function abortUpload(actor: Actor, id: string): Promise<void> {
	const upload = await withActor(actor, async (trx) => {
		const found = await lockUpload(trx, id);
		if (found.state === 'completing') requireReceiving(found);
		if (found.state === 'receiving') await saveState(trx, id, 'abandoned');
		return found;
	});
	if (upload.state === 'done') return;
	await discard(upload);
	await withActor(actor, (trx) => removeUpload(trx, id));
}
