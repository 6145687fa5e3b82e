import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { DocumentDetails } from '$lib/schemas/document';
import { documentDetailsSchema } from '$lib/schemas/document';
import type { Actor, Role } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';
import {
	attachDocument,
	attachedDocuments,
	createDocument,
	detachDocument,
	downloadAddress,
	readDocument,
	searchDocuments
} from '$lib/server/services/documents';
import { abortUpload, beginUpload, completeUpload, putPart, type FinishedUpload } from '$lib/server/services/uploads';
import { sweepUploads } from '$lib/server/services/uploads-sweep';
import { bucket, closeBucket } from '$lib/server/storage/bucket';
import { PART_BYTES } from '$lib/server/storage/upload-rules';
import { startBucket, type RunningBucket } from '../../minio-fake/server';
import { insertPerson } from './support/people';

let folder = '';
let standIn: RunningBucket;
let owner: pg.Client;
let officer: Actor;
let formulator: Actor;
let client: Actor;
let materialId = '';

const person = (name: string, role: Role, clientId: string | null = null) => insertPerson(owner, name, role, clientId);

beforeAll(async () => {
	folder = await mkdtemp(join(tmpdir(), 'uploads-'));
	standIn = await startBucket({ dataDir: folder });
	Object.assign(process.env, {
		S3_ENDPOINT: standIn.endpoint,
		S3_BUCKET: standIn.bucket,
		S3_REGION: standIn.region,
		S3_ACCESS_KEY_ID: standIn.accessKeyId,
		S3_SECRET_ACCESS_KEY: standIn.secretAccessKey
	});
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	officer = await person('officer', 'officer');
	formulator = await person('formulator', 'formulator');
	const clientId = newId();
	await owner.query(`insert into client (id, name) values ($1, 'A brand')`, [clientId]);
	client = await person('client', 'client', clientId);
	const supplierId = newId();
	materialId = newId();
	await owner.query(`insert into supplier (id, name, created_by) values ($1, 'A supplier', $2)`, [
		supplierId,
		officer.personId
	]);
	await owner.query(
		`insert into material (id, code, trade_name, supplier_id, created_by) values ($1, 'M-1', 'A material', $2, $3)`,
		[materialId, supplierId, officer.personId]
	);
});

afterAll(async () => {
	closeBucket();
	await owner.end();
	await standIn.close();
	await rm(folder, { recursive: true, force: true });
});

const sha256 = (content: Uint8Array) => createHash('sha256').update(content).digest('hex');

async function* inPieces(content: Uint8Array): AsyncGenerator<Uint8Array> {
	for (let at = 0; at < content.length; at += 70_000) yield content.subarray(at, at + 70_000);
}

const announce = (name: string, bytes: number, actor = officer) =>
	beginUpload(actor, { name, bytes, purpose: 'evidence' });

async function sendAll(actor: Actor, id: string, content: Uint8Array): Promise<void> {
	for (let number = 1; (number - 1) * PART_BYTES < content.length; number++) {
		await putPart(actor, id, number, inPieces(content.subarray((number - 1) * PART_BYTES, number * PART_BYTES)));
	}
}

async function upload(
	name: string,
	content: Uint8Array,
	details: DocumentDetails | null = null
): Promise<FinishedUpload> {
	const { id } = await announce(name, content.length);
	await sendAll(officer, id, content);
	return completeUpload(officer, id, details);
}

const text = (content: string) => new TextEncoder().encode(content);
const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });

/** Everything of an upload outside the place of its content. */
async function leftBehind(): Promise<readonly unknown[]> {
	const files = await Promise.all(['tmp', 'uploads'].map((each) => readdir(join(folder, each))));
	return [...(await bucket().list('upload/')), ...(await bucket().unfinished('upload/')), ...files.flat()];
}

const rowOf = async (id: string) => (await owner.query('select * from upload where id = $1', [id])).rows[0];

/** A PDF of empty pages; `more` goes into its trailer. */
function pdf(pages: number, more = ''): Uint8Array {
	const kids = Array.from({ length: pages }, (_, index) => `${index + 3} 0 R`).join(' ');
	const page = '<</Type/Page/Parent 2 0 R/MediaBox[0 0 9 9]>>';
	const objects = [
		'<</Type/Catalog/Pages 2 0 R>>',
		`<</Type/Pages/Count ${pages}/Kids[${kids}]>>`,
		...Array(pages).fill(page)
	];
	const body = objects.map((object, index) => `${index + 1} 0 obj${object}endobj\n`).join('');
	return text(`%PDF-1.4\n${body}trailer<</Size ${objects.length + 1}/Root 1 0 R${more}>>\n%%EOF\n`);
}
const LOCKED = `/ID[<00><00>]/Encrypt<</Filter/Standard/V 1/R 2/P -4/O<${'11'.repeat(32)}>/U<${'22'.repeat(32)}>>>`;

const details = (more: object = {}): DocumentDetails =>
	documentDetailsSchema.parse({ kind: 'composition', title: 'Composition of a material', ...more });

describe('before the first byte', () => {
	test.each([
		['over 250 MiB', 262_144_001, 'file-too-large', { name: 'big.pdf', bytes: 262_144_001, limit: 262_144_000 }],
		['of 0 bytes', 0, 'file-empty', { name: 'big.pdf' }]
	])('a file %s is refused by name and size', async (_what, bytes, code, data) => {
		await expect(announce('big.pdf', bytes)).rejects.toThrow(refusal(code, data));
		expect(await leftBehind()).toEqual([]);
	});

	test('who may not attach documents may not begin', async () => {
		await expect(announce('a.pdf', 10, client)).rejects.toThrow(refusal('forbidden'));
	});

	test('the name is kept without its folder', async () => {
		const { id, name } = await announce('C:\\reports\\a.pdf', 10);
		expect(name).toBe('a.pdf');
		await abortUpload(officer, id);
	});
});

describe('a file in parts', () => {
	test('is kept under its hash, whatever the order of the parts, and nothing else stays', async () => {
		const content = Buffer.concat([text('a;b\n1;2\n'), Buffer.alloc(PART_BYTES, '3;4\n'), text('5;6\n')]);
		const { id, parts, partBytes } = await announce('table.csv', content.length);
		expect([parts, partBytes]).toEqual([2, PART_BYTES]);
		await putPart(officer, id, 2, inPieces(content.subarray(PART_BYTES)));
		await putPart(officer, id, 1, inPieces(randomBytes(PART_BYTES)));
		await putPart(officer, id, 1, inPieces(content.subarray(0, PART_BYTES)));
		const done = await completeUpload(officer, id);
		expect(done).toMatchObject({
			sha256: sha256(content),
			bytes: content.length,
			mediaType: 'text/csv',
			renamed: false,
			bindable: false,
			documentId: null
		});
		expect(await bucket().head(`sha256/${done.sha256.slice(0, 2)}/${done.sha256}`)).toMatchObject({
			bytes: content.length
		});
		expect(await leftBehind()).toEqual([]);
		expect(await completeUpload(officer, id)).toEqual(done);
	});

	test.each([
		['too short', 999],
		['too long', 1001]
	])('a part that is %s is refused and can be sent again', async (_what, bytes) => {
		const { id } = await announce('a.txt', 1000);
		await expect(putPart(officer, id, 1, inPieces(Buffer.alloc(bytes, 'a')))).rejects.toThrow(
			refusal('upload-broken', { name: 'a.txt', part: 1, limit: 1000 })
		);
		await putPart(officer, id, 1, inPieces(Buffer.alloc(1000, 'a')));
		await abortUpload(officer, id);
	});

	test('a part whose line is cut is refused; completing names what is missing', async () => {
		const { id } = await announce('a.txt', 200_000);
		async function* cut(): AsyncGenerator<Uint8Array> {
			yield Buffer.alloc(1000);
			throw new Error('aborted');
		}
		await expect(putPart(officer, id, 1, cut())).rejects.toThrow(refusal('upload-broken', { part: 1, bytes: 1000 }));
		await expect(completeUpload(officer, id)).rejects.toThrow(
			refusal('upload-broken', { name: 'a.txt', missing: [1] })
		);
		await abortUpload(officer, id);
		expect(await leftBehind()).toEqual([]);
	});

	test.each([0, 2])('a file of one part has no part %i', async (number) => {
		const { id } = await announce('a.txt', 10);
		await expect(putPart(officer, id, number, inPieces(Buffer.alloc(10)))).rejects.toThrow(refusal('upload-broken'));
		await abortUpload(officer, id);
	});

	test('is another person’s business only', async () => {
		const { id } = await announce('a.txt', 4);
		await expect(putPart(formulator, id, 1, inPieces(text('text')))).rejects.toThrow(refusal('not-found'));
		await expect(completeUpload(formulator, id)).rejects.toThrow(refusal('not-found'));
		await expect(abortUpload(formulator, id)).rejects.toThrow(refusal('not-found'));
		await abortUpload(officer, id);
	});

	test('given up leaves neither a row nor a byte', async () => {
		const { id } = await announce('a.bin', 10);
		await sendAll(officer, id, randomBytes(10));
		await abortUpload(officer, id);
		expect(await rowOf(id)).toBeUndefined();
		expect(await leftBehind()).toEqual([]);
		await expect(putPart(officer, id, 1, inPieces(text('x')))).rejects.toThrow(refusal('not-found'));
	});

	test('of a kind that is not kept is refused, and gone', async () => {
		const { id } = await announce('report.pdf', 8);
		await sendAll(officer, id, Buffer.from('4d5a900003000000', 'hex'));
		await expect(completeUpload(officer, id)).rejects.toThrow(refusal('kind-not-taken', { name: 'report.pdf' }));
		expect((await rowOf(id)).state).toBe('abandoned');
		expect(await leftBehind()).toEqual([]);
	});

	test('that the bucket fails to join is given up whole', async () => {
		const { id } = await announce('a.txt', 4);
		await sendAll(officer, id, text('text'));
		standIn.control.failNext({ code: 'InternalError', method: 'POST', times: 3 });
		await expect(completeUpload(officer, id)).rejects.toThrow();
		expect(await leftBehind()).toEqual([]);
	});

	test('completed twice at once is completed once', async () => {
		const { id } = await announce('a.txt', 4);
		await sendAll(officer, id, text('both'));
		const ends = await Promise.allSettled([completeUpload(officer, id), completeUpload(officer, id)]);
		// The later call is refused while the first still works, and answered the same once it is through.
		const answers = ends.map((end) => (end.status === 'fulfilled' ? end.value.sha256 : end.reason.code));
		const { state, sha256 } = await rowOf(id);
		expect(state).toBe('done');
		expect(answers).toContain(sha256);
		expect([sha256, 'wrong-state']).toEqual(expect.arrayContaining(answers));
	});

	test('sent twice is kept once', async () => {
		const content = text(`the same ${randomUUID()}`);
		const [first, second] = [await upload('a.txt', content), await upload('b.txt', content)];
		expect(second.sha256).toBe(first.sha256);
		const { rows } = await owner.query('select count(*)::int as count from file_object where sha256 = $1', [
			first.sha256
		]);
		expect(rows).toEqual([{ count: 1 }]);
	});
});

describe('what is said of a file', () => {
	test('a PDF has its pages and can be bound', async () => {
		expect(await upload('a.pdf', pdf(3))).toMatchObject({ pages: 3, encrypted: false, broken: false, bindable: true });
	});

	test('an encrypted PDF is kept and cannot be bound', async () => {
		expect(await upload('a.pdf', pdf(2, LOCKED))).toMatchObject({ encrypted: true, bindable: false });
	});

	test('a broken PDF is kept and cannot be bound', async () => {
		expect(await upload('a.pdf', text('%PDF-1.7 nothing'))).toMatchObject({ broken: true, bindable: false });
	});

	test('a renamed file is kept under its true kind, and this is said', async () => {
		const done = await upload('report.docx', pdf(5));
		expect(done).toMatchObject({
			mediaType: 'application/pdf',
			renamed: true,
			trueName: 'report.pdf',
			name: 'report.docx'
		});
	});
});

describe('documents', () => {
	const subjects = () => [{ kind: 'material', id: materialId }];

	test('completing files and attaches the document in one step, with its audit', async () => {
		const more = { dated: '2026-03-01', expires: '2028-03-01', subjects: subjects() };
		const { documentId, sha256: hash } = await upload('report.docx', pdf(7), details(more));
		if (documentId === null) throw new Error('No document was filed.');
		const { document, links } = await readDocument(formulator, documentId);
		expect(document).toMatchObject({
			title: 'Composition of a material',
			dated: '2026-03-01',
			expires: '2028-03-01',
			fileName: 'report.docx',
			trueName: 'report.pdf',
			renamed: true,
			pages: 7,
			sha256: hash,
			createdByName: 'officer'
		});
		expect(links).toMatchObject([{ subjectKind: 'material', subjectId: materialId }]);
		const { rows } = await owner.query('select action from audit_row where subject = $1 order by action', [documentId]);
		expect(rows.map(({ action }) => action)).toEqual(['document-attached', 'document-filed']);
	});

	test('a subject that is not there undoes the whole step', async () => {
		const content = text(`undone ${randomUUID()}`);
		const nowhere = details({ title: 'Undone', subjects: [{ kind: 'product', id: newId() }] });
		await expect(upload('a.txt', content, nowhere)).rejects.toThrow(refusal('not-found'));
		const { rows } = await owner.query('select 1 from file_object where sha256 = $1', [sha256(content)]);
		expect(rows).toEqual([]);
		expect((await searchDocuments(officer, { q: 'Undone', page: 1, sort: '', dir: 'asc' })).total).toBe(0);
		expect(await leftBehind()).toEqual([]);
	});

	test('can be filed later, attached, found and detached', async () => {
		const { uploadId } = await upload('later.txt', text('later'));
		const id = await createDocument(officer, uploadId, details({ title: '100 % of it_' }));
		const link = await attachDocument(formulator, id, { kind: 'material', id: materialId, need: 'A2' });
		expect((await attachedDocuments(officer, 'material', materialId)).map((each) => each.id)).toContain(id);
		const found = await searchDocuments(officer, { q: '% of it_', page: 1, sort: 'expires', dir: 'desc' });
		expect(found.rows.map((each) => each.id)).toEqual([id]);
		await detachDocument(formulator, link, 'attached to the wrong material');
		expect((await attachedDocuments(officer, 'material', materialId)).map((each) => each.id)).not.toContain(id);
		await expect(detachDocument(formulator, link, null)).rejects.toThrow(refusal('not-found'));
	});

	test('an upload that is not finished is no document yet', async () => {
		const { id } = await announce('a.txt', 4);
		await expect(createDocument(officer, id, details())).rejects.toThrow(refusal('wrong-state'));
		await abortUpload(officer, id);
	});

	test('its download is signed, with the name of its true kind', async () => {
		const { documentId } = await upload('Prüfung.docx', pdf(9), details());
		const answer = await fetch(await downloadAddress(formulator, documentId ?? '', 'attachment'));
		expect(answer.headers.get('content-type')).toBe('application/pdf');
		expect(answer.headers.get('content-disposition')).toContain(`filename*=UTF-8''Pr%C3%BCfung.pdf`);
		expect(sha256(new Uint8Array(await answer.arrayBuffer()))).toBe(sha256(pdf(9)));
	});

	test('a client sees none of the laboratory’s documents', async () => {
		const { documentId } = await upload('a.pdf', pdf(1), details());
		await expect(readDocument(client, documentId ?? '')).rejects.toThrow(refusal('not-found'));
		await expect(downloadAddress(client, documentId ?? '', 'inline')).rejects.toThrow(refusal('not-found'));
		expect((await searchDocuments(client, { q: '', page: 1, sort: '', dir: 'asc' })).total).toBe(0);
		await expect(createDocument(client, newId(), details())).rejects.toThrow(refusal('forbidden'));
	});
});

describe('the sweep', () => {
	const inHours = (hours: number) => new Date(Date.now() + hours * 3_600_000);

	test('removes what nobody finished and leaves the rest alone', async () => {
		const cut = await announce('cut.txt', 10);
		await sendAll(officer, cut.id, Buffer.alloc(10, 'a'));
		expect(await sweepUploads(inHours(0))).toEqual({ uploads: 0, strays: 0 });
		expect(await rowOf(cut.id)).toMatchObject({ state: 'receiving' });
		const kept = await upload('kept.txt', text('kept'));
		expect((await sweepUploads(inHours(25))).uploads).toBeGreaterThan(0);
		expect(await rowOf(cut.id)).toBeUndefined();
		expect(await rowOf(kept.uploadId)).toMatchObject({ state: 'done' });
		expect(await leftBehind()).toEqual([]);
	});

	test('removes parts and joined files that no row knows', async () => {
		const key = `upload/${randomUUID()}`;
		await bucket().beginParts(key);
		await bucket().put(`upload/${randomUUID()}`, text('x'), 'text/plain');
		expect(await sweepUploads(inHours(1))).toMatchObject({ strays: 0 });
		expect(await sweepUploads(inHours(3))).toMatchObject({ strays: 2 });
		expect(await leftBehind()).toEqual([]);
	});
});
