import { Refused } from '../refused';
import type { UploadPart } from './schema';
import type { Trx } from './with-actor';

export interface UploadRow {
	readonly id: string;
	readonly name: string;
	readonly purpose: string;
	readonly expectedBytes: number;
	readonly s3UploadId: string;
	readonly state: 'receiving' | 'completing' | 'done' | 'abandoned';
	readonly parts: readonly UploadPart[];
	readonly sha256: string | null;
	readonly expiresAt: Date;
}

const uploadRows = (trx: Trx) =>
	trx
		.selectFrom('upload')
		.select(['id', 'name', 'purpose', 'expected_bytes', 's3_upload_id', 'state', 'parts', 'sha256', 'expires_at']);

type Raw = Awaited<ReturnType<ReturnType<typeof uploadRows>['executeTakeFirstOrThrow']>>;

const rowOf = (raw: Raw): UploadRow => ({
	id: raw.id,
	name: raw.name,
	purpose: raw.purpose,
	// At most 250 MiB: far below what a number holds exactly.
	expectedBytes: Number(raw.expected_bytes),
	s3UploadId: raw.s3_upload_id,
	state: raw.state,
	parts: raw.parts,
	sha256: raw.sha256,
	expiresAt: raw.expires_at
});

export interface NewUpload {
	readonly id: string;
	readonly personId: string;
	readonly purpose: string;
	readonly name: string;
	readonly bytes: number;
	readonly s3UploadId: string;
	readonly expiresAt: Date;
}

export async function insertUpload(trx: Trx, upload: NewUpload): Promise<void> {
	await trx
		.insertInto('upload')
		.values({
			id: upload.id,
			person_id: upload.personId,
			purpose: upload.purpose,
			name: upload.name,
			expected_bytes: upload.bytes,
			s3_upload_id: upload.s3UploadId,
			state: 'receiving',
			expires_at: upload.expiresAt
		})
		.execute();
}

/** @throws Refused 'not-found', also for somebody else's upload. */
export async function uploadById(trx: Trx, id: string): Promise<UploadRow> {
	const raw = await uploadRows(trx).where('id', '=', id).executeTakeFirst();
	if (!raw) throw new Refused('not-found');
	return rowOf(raw);
}

/** @throws Refused 'not-found'. */
export async function lockUpload(trx: Trx, id: string): Promise<UploadRow> {
	const raw = await uploadRows(trx).where('id', '=', id).forUpdate().executeTakeFirst();
	if (!raw) throw new Refused('not-found');
	return rowOf(raw);
}

export async function saveParts(trx: Trx, id: string, parts: readonly UploadPart[], expiresAt: Date): Promise<void> {
	const values = { parts: JSON.stringify(parts), expires_at: expiresAt };
	await trx.updateTable('upload').set(values).where('id', '=', id).execute();
}

export async function saveState(
	trx: Trx,
	id: string,
	state: UploadRow['state'],
	more: { readonly sha256?: string; readonly expiresAt?: Date } = {}
): Promise<void> {
	const { sha256, expiresAt } = more;
	const values = { state, ...(sha256 ? { sha256 } : {}), ...(expiresAt ? { expires_at: expiresAt } : {}) };
	await trx.updateTable('upload').set(values).where('id', '=', id).execute();
}

export async function removeUpload(trx: Trx, id: string): Promise<void> {
	await trx.deleteFrom('upload').where('id', '=', id).execute();
}

/** Uploads that nobody will finish; the oldest first. */
export async function expiredUploads(trx: Trx, now: Date, most: number): Promise<readonly UploadRow[]> {
	const rows = await uploadRows(trx)
		.where('state', '!=', 'done')
		.where('expires_at', '<', now)
		.orderBy('expires_at')
		.limit(most)
		.execute();
	return rows.map(rowOf);
}

/** Of these ids, the ones that still have a row. */
export async function knownUploads(trx: Trx, ids: readonly string[]): Promise<ReadonlySet<string>> {
	if (ids.length === 0) return new Set();
	const rows = await trx.selectFrom('upload').select('id').where('id', 'in', ids).execute();
	return new Set(rows.map((row) => row.id));
}
