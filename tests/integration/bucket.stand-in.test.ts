/** What the local stand-in in minio-fake/ promises beyond the contract that any bucket must keep. */
import { randomBytes } from 'node:crypto';
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import {
	AbortMultipartUploadCommand,
	CreateMultipartUploadCommand,
	DeleteObjectCommand,
	GetObjectAclCommand,
	GetObjectCommand,
	HeadObjectCommand,
	ListPartsCommand,
	PutObjectCommand,
	S3Client,
	UploadPartCommand,
	type PutObjectCommandInput
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { startBucket, type RunningBucket } from '../../minio-fake/server';

const MIB = 1024 * 1024;
const ALLOWED_ORIGIN = 'http://127.0.0.1:4310';

let folder = '';
let target: RunningBucket;
let s3: S3Client;

const clientOf = (running: RunningBucket): S3Client =>
	new S3Client({
		endpoint: running.endpoint,
		region: running.region,
		forcePathStyle: true,
		credentials: running,
		requestChecksumCalculation: 'WHEN_REQUIRED',
		maxAttempts: 1
	});

beforeAll(async () => {
	folder = await mkdtemp(join(tmpdir(), 'bucket-stand-in-'));
	target = await startBucket({ dataDir: folder, corsOrigins: [ALLOWED_ORIGIN] });
	s3 = clientOf(target);
	await put('plain.txt', 'borage');
});

afterAll(async () => {
	s3.destroy();
	await target.close();
	await rm(folder, { recursive: true, force: true });
});

const at = (name: string) => ({ Bucket: target.bucket, Key: name });
const put = (name: string, body: string, more: Partial<PutObjectCommandInput> = {}) =>
	s3.send(new PutObjectCommand({ ...at(name), Body: body, ...more }));
const textOf = async (name: string) =>
	(await s3.send(new GetObjectCommand(at(name)))).Body?.transformToString() ?? Promise.resolve('');
const exists = (name: string): Promise<boolean> =>
	s3.send(new HeadObjectCommand(at(name))).then(
		() => true,
		() => false
	);

const held = async (): Promise<readonly string[]> => {
	const names = await Promise.all(['tmp', 'uploads'].map((each) => readdir(join(folder, each))));
	return names.flat();
};

test('keys that climb stay keys: no file appears outside the folder', async () => {
	const climbing = ['../../climb', '../climb', '..', './climb', '/etc/climb', 'a/../../climb'];
	const before = await readdir(tmpdir());
	for (const Key of climbing) {
		await s3.send(new PutObjectCommand({ Bucket: target.bucket, Key, Body: Key }));
		const { Body } = await s3.send(new GetObjectCommand({ Bucket: target.bucket, Key }));
		expect(await Body?.transformToString()).toBe(Key);
		await s3.send(new DeleteObjectCommand({ Bucket: target.bucket, Key }));
	}
	expect((await readdir(folder)).sort()).toEqual(['objects', 'tmp', 'uploads']);
	expect((await readdir(tmpdir())).filter((name) => name.includes('climb') && !before.includes(name))).toEqual([]);
});

/** Sends the beginning of a signed request by hand and closes the line; resolves when the bucket let go too. */
async function sendAndCut(address: string, headers: string, beginning: Uint8Array): Promise<void> {
	const { hostname, port, pathname, search, host } = new URL(address);
	const socket = connect(Number(port), hostname);
	await new Promise((resolve) => socket.once('connect', resolve));
	socket.write(`PUT ${pathname}${search} HTTP/1.1\r\nhost: ${host}\r\n${headers}\r\n\r\n`);
	await new Promise((resolve) => socket.write(beginning, resolve));
	// `end` half-closes: the bucket has read everything before it sees the line go.
	await new Promise((resolve) => socket.once('close', resolve).resume().end());
}

test('a cut connection leaves neither an object nor a file', async () => {
	const address = await getSignedUrl(s3, new PutObjectCommand(at('cut')), { expiresIn: 60 });
	await sendAndCut(address, `content-length: ${9 * MIB}`, randomBytes(3 * MIB));
	await expect.poll(held).toEqual([]);
	expect(await exists('cut')).toBe(false);
});

test('a part that was cut is not a part', async () => {
	const { UploadId = '' } = await s3.send(new CreateMultipartUploadCommand(at('cut-part')));
	const part = new UploadPartCommand({ ...at('cut-part'), UploadId, PartNumber: 1 });
	await sendAndCut(await getSignedUrl(s3, part, { expiresIn: 60 }), `content-length: ${9 * MIB}`, randomBytes(MIB));
	await expect.poll(() => readdir(join(folder, 'tmp'))).toEqual([]);
	const { Parts } = await s3.send(new ListPartsCommand({ ...at('cut-part'), UploadId }));
	expect(Parts ?? []).toEqual([]);
	await s3.send(new AbortMultipartUploadCommand({ ...at('cut-part'), UploadId }));
	expect(await held()).toEqual([]);
});

test('calls it does not know are refused, not half done', async () => {
	const unknown = expect.objectContaining({ name: 'NotImplemented' });
	await expect(s3.send(new GetObjectAclCommand(at('plain.txt')))).rejects.toThrow(unknown);
	await expect(put('encrypted', 'x', { ServerSideEncryption: 'AES256' })).rejects.toThrow(unknown);
	await expect(s3.send(new GetObjectCommand({ ...at('plain.txt'), VersionId: '1' }))).rejects.toThrow(unknown);
	await expect(s3.send(new GetObjectCommand({ Bucket: 'another', Key: 'x' }))).rejects.toThrow(
		expect.objectContaining({ name: 'NoSuchBucket' })
	);
});

test('a page of a listed origin may call it, another may not', async () => {
	const preflight = (origin: string) => {
		const headers = {
			origin,
			'access-control-request-method': 'PUT',
			'access-control-request-headers': 'content-type'
		};
		return fetch(`${target.endpoint}/${target.bucket}/x`, { method: 'OPTIONS', headers });
	};
	const allowed = await preflight(ALLOWED_ORIGIN);
	expect(allowed.status).toBe(204);
	expect(allowed.headers.get('access-control-allow-origin')).toBe(ALLOWED_ORIGIN);
	expect(allowed.headers.get('access-control-allow-methods')).toContain('PUT');
	expect((await preflight('http://elsewhere.example')).status).toBe(403);
});

test('a browser is told not to guess the type', async () => {
	await put('sniffed', '<script>');
	const answer = await fetch(await getSignedUrl(s3, new GetObjectCommand(at('sniffed')), { expiresIn: 60 }));
	expect(answer.headers.get('x-content-type-options')).toBe('nosniff');
});

test('a forced header with a line break is refused', async () => {
	const more = { ResponseContentDisposition: 'attachment\r\nset-cookie: a=b' };
	const address = await getSignedUrl(s3, new GetObjectCommand({ ...at('plain.txt'), ...more }), { expiresIn: 60 });
	expect((await fetch(address)).status).toBe(400);
});

test('what it holds is there again after a restart', async () => {
	const dataDir = join(folder, 'restart');
	const first = await startBucket({ dataDir });
	await clientOf(first).send(new PutObjectCommand({ Bucket: first.bucket, Key: 'stays', Body: 'x' }));
	await first.close();
	const second = await startBucket({ dataDir });
	const { Body } = await clientOf(second).send(new GetObjectCommand({ Bucket: second.bucket, Key: 'stays' }));
	expect(await Body?.transformToString()).toBe('x');
	await second.close();
	await rm(dataDir, { recursive: true });
});

test('a call can be told to fail', async () => {
	target.control.failNext({ code: 'SlowDown', method: 'PUT' });
	await expect(put('told', 'x')).rejects.toThrow(expect.objectContaining({ name: 'SlowDown' }));
	await put('told', 'x');
	target.control.failNext({ code: 'cut' });
	await expect(put('told', 'y')).rejects.toThrow();
	expect(await textOf('told')).toBe('x');
});
