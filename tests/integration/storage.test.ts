import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buffer, text } from 'node:stream/consumers';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { Bucket } from '$lib/server/storage/bucket';
import { contentKey, uploadKey } from '$lib/server/storage/keys';
import { PART_BYTES } from '$lib/server/storage/upload-rules';
import { startBucket, type RunningBucket } from '../../minio-fake/server';

let folder = '';
let running: RunningBucket;
let bucket: Bucket;

beforeAll(async () => {
	folder = await mkdtemp(join(tmpdir(), 'storage-'));
	running = await startBucket({ dataDir: folder });
	bucket = new Bucket({ ...running, forcePathStyle: true });
});

afterAll(async () => {
	bucket.close();
	await running.close();
	await rm(folder, { recursive: true, force: true });
});

const sha256 = (content: string | Uint8Array) => createHash('sha256').update(content).digest('hex');

async function store(content: string, mediaType = 'application/pdf'): Promise<string> {
	const hash = sha256(content);
	await bucket.put(contentKey(hash), Buffer.from(content), mediaType);
	return hash;
}

describe('keys', () => {
	test('content lies under its hash', () => {
		expect(contentKey('ab'.repeat(32))).toBe(`sha256/ab/${'ab'.repeat(32)}`);
	});

	test.each(['', '../x', 'AB'.repeat(32), `${'ab'.repeat(31)}a/`])('%j is no hash', (hash) => {
		expect(() => contentKey(hash)).toThrow('SHA-256');
	});

	test('an upload lies under its id, and only under an id', () => {
		const id = randomUUID();
		expect(uploadKey(id)).toBe(`upload/${id}`);
		expect(() => uploadKey('../x')).toThrow('id of an upload');
	});
});

describe('objects', () => {
	test('what is put is got and known by its head', async () => {
		await bucket.put('a', Buffer.from('borage'), 'text/plain');
		expect(await bucket.head('a')).toMatchObject({ bytes: 6, mediaType: 'text/plain' });
		const content = await bucket.get('a');
		expect(content && (await text(content.body))).toBe('borage');
		const piece = await bucket.get('a', { start: 1, end: 2 });
		expect(piece && (await text(piece.body))).toBe('or');
	});

	test('what is not there is null, and removing it is no error', async () => {
		expect(await bucket.get('nowhere')).toBeNull();
		expect(await bucket.head('nowhere')).toBeNull();
		await bucket.delete('nowhere');
	});

	test('a copy takes the media type it is given', async () => {
		await bucket.put('from (é) +1', Buffer.from('woad'), 'application/octet-stream');
		await bucket.copy('from (é) +1', 'to', 'text/csv');
		expect(await bucket.head('to')).toMatchObject({ bytes: 4, mediaType: 'text/csv' });
	});

	test('a listing tells what lies below a prefix', async () => {
		await bucket.put('below/1', Buffer.from('x'), 'text/plain');
		expect((await bucket.list('below/')).map(({ key }) => key)).toEqual(['below/1']);
	});

	test('a bucket that answers is told from one that does not', async () => {
		expect(await bucket.answers()).toBe(true);
		const other = new Bucket({ ...running, bucket: 'another', forcePathStyle: true });
		expect(await other.answers()).toBe(false);
		other.close();
	});

	test('a bucket that is busy is asked again', async () => {
		running.control.failNext({ code: 'SlowDown', method: 'PUT' });
		await bucket.put('busy', Buffer.from('x'), 'text/plain');
		expect(await bucket.head('busy')).not.toBeNull();
	});
});

describe('parts', () => {
	test('are joined in the order of their numbers', async () => {
		const content = randomBytes(PART_BYTES + 1000);
		const key = uploadKey(randomUUID());
		const id = await bucket.beginParts(key);
		const second = await bucket.putPart(key, id, 2, content.subarray(PART_BYTES));
		const first = await bucket.putPart(key, id, 1, content.subarray(0, PART_BYTES));
		expect((await bucket.unfinished('upload/')).map((each) => each.uploadId)).toEqual([id]);
		if (!first || !second) throw new Error('A part was not taken.');
		await bucket.completeParts(key, id, [first, second]);
		const stored = await bucket.get(key);
		expect(stored && sha256(await buffer(stored.body))).toBe(sha256(content));
		expect(await bucket.unfinished('upload/')).toEqual([]);
	});

	test('after an abort no part is taken, and aborting again is no error', async () => {
		const key = uploadKey(randomUUID());
		const id = await bucket.beginParts(key);
		await bucket.abortParts(key, id);
		await bucket.abortParts(key, id);
		expect(await bucket.putPart(key, id, 1, Buffer.from('x'))).toBeNull();
	});
});

describe('a signed download', () => {
	test('forces type and name, and is not kept by a browser', async () => {
		const hash = await store('%PDF-1.7', 'application/octet-stream');
		const about = {
			fileName: 'Prüfbericht "β".pdf',
			mediaType: 'application/pdf',
			disposition: 'inline',
			seconds: 30
		} as const;
		const answer = await fetch(await bucket.signedDownload(hash, about));
		expect(await answer.text()).toBe('%PDF-1.7');
		expect(Object.fromEntries(answer.headers)).toMatchObject({
			'content-type': 'application/pdf',
			'content-disposition': `inline; filename="Prufbericht ___.pdf"; filename*=UTF-8''Pr%C3%BCfbericht%20_%CE%B2_.pdf`,
			'cache-control': 'private, no-store',
			'x-content-type-options': 'nosniff'
		});
	});

	test('never shows inline what could run or is not known', async () => {
		const hash = await store('<script>1</script>');
		for (const mediaType of ['text/html', 'image/svg+xml', 'text/csv', 'application/octet-stream']) {
			const about = { fileName: 'a', mediaType, disposition: 'inline', seconds: 30 } as const;
			const answer = await fetch(await bucket.signedDownload(hash, about));
			expect(answer.headers.get('content-disposition')).toMatch(/^attachment;/);
		}
	});

	test('opens one content, as it was signed and no other', async () => {
		const [mine, other] = [await store('mine'), await store('other')];
		const about = { fileName: 'a.pdf', mediaType: 'application/pdf', disposition: 'attachment', seconds: 30 } as const;
		const address = await bucket.signedDownload(mine, about);
		expect((await fetch(address.replace(contentKey(mine), contentKey(other)))).status).toBe(403);
		expect((await fetch(address.replace('application%2Fpdf', 'text%2Fhtml'))).status).toBe(403);
		expect((await fetch(address)).status).toBe(200);
	});

	test('is over after its seconds, and those are few whatever is asked', async () => {
		const hash = await store('short');
		const about = { fileName: 'a', mediaType: 'application/pdf', disposition: 'attachment' } as const;
		const address = new URL(await bucket.signedDownload(hash, { ...about, seconds: 86_400 }));
		expect(address.searchParams.get('X-Amz-Expires')).toBe('900');
		const later = await startBucket({ dataDir: join(folder, 'later'), clock: () => new Date(Date.now() + 31_000) });
		const there = new Bucket({ ...later, forcePathStyle: true });
		expect((await fetch(await there.signedDownload(hash, { ...about, seconds: 30 }))).status).toBe(403);
		there.close();
		await later.close();
	});

	test('is made for the address that browsers use', async () => {
		const settings = { ...running, forcePathStyle: true, publicEndpoint: 'https://files.example' };
		const outside = new Bucket(settings);
		const about = { fileName: 'a', mediaType: 'application/pdf', disposition: 'attachment', seconds: 30 } as const;
		expect(await outside.signedDownload('ab'.repeat(32), about)).toMatch(
			/^https:\/\/files\.example\/costmary\/sha256\/ab\//
		);
		outside.close();
	});
});
