/**
 * What Costmary asks of a bucket, through the SDK it uses. By default the stand-in in minio-fake/ answers. With
 * S3_CONTRACT=real the same tests run against the bucket named by S3_ENDPOINT, S3_REGION, S3_BUCKET,
 * S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY and S3_FORCE_PATH_STYLE; everything is written under one prefix and removed.
 */
import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import {
	AbortMultipartUploadCommand,
	CompleteMultipartUploadCommand,
	CopyObjectCommand,
	CreateMultipartUploadCommand,
	DeleteObjectCommand,
	DeleteObjectsCommand,
	GetObjectCommand,
	HeadObjectCommand,
	ListMultipartUploadsCommand,
	ListObjectsV2Command,
	ListPartsCommand,
	PutObjectCommand,
	S3Client,
	UploadPartCommand,
	type ChecksumAlgorithm
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { startBucket, type RunningBucket } from '../../minio-fake/server';

const real = process.env.S3_CONTRACT === 'real';
const MIB = 1024 * 1024;

interface Target {
	readonly endpoint: string | undefined;
	readonly region: string;
	readonly bucket: string;
	readonly accessKeyId: string;
	readonly secretAccessKey: string;
	readonly forcePathStyle: boolean;
}

const need = (name: string): string => {
	const value = process.env[name];
	if (!value) throw new Error(`${name} must be set to test a real bucket.`);
	return value;
};

const realTarget = (): Target => ({
	endpoint: process.env.S3_ENDPOINT,
	region: need('S3_REGION'),
	bucket: need('S3_BUCKET'),
	accessKeyId: need('S3_ACCESS_KEY_ID'),
	secretAccessKey: need('S3_SECRET_ACCESS_KEY'),
	forcePathStyle: process.env.S3_FORCE_PATH_STYLE !== 'false'
});

let folder = '';
let standIn: RunningBucket | null = null;
let target: Target;
let s3: S3Client;
const prefix = `contract-test/${randomUUID()}/`;
const at = (name: string) => ({ Bucket: target.bucket, Key: `${prefix}${name}` });

type Mode = 'WHEN_REQUIRED' | 'WHEN_SUPPORTED';

const client = (mode: Mode, keys: { accessKeyId: string; secretAccessKey: string } = target): S3Client =>
	new S3Client({
		...(target.endpoint ? { endpoint: target.endpoint } : {}),
		region: target.region,
		forcePathStyle: target.forcePathStyle,
		credentials: { accessKeyId: keys.accessKeyId, secretAccessKey: keys.secretAccessKey },
		requestChecksumCalculation: mode,
		responseChecksumValidation: mode,
		maxAttempts: 1
	});

beforeAll(async () => {
	folder = await mkdtemp(join(tmpdir(), 'bucket-contract-'));
	if (!real) standIn = await startBucket({ dataDir: folder });
	target = standIn ? { ...standIn, forcePathStyle: true } : realTarget();
	s3 = client('WHEN_REQUIRED');
});

afterAll(async () => {
	const left = await s3.send(new ListObjectsV2Command({ Bucket: target.bucket, Prefix: prefix }));
	for (const { Key } of left.Contents ?? []) await s3.send(new DeleteObjectCommand({ Bucket: target.bucket, Key }));
	s3.destroy();
	await standIn?.close();
	await rm(folder, { recursive: true, force: true });
});

const textOf = async (name: string): Promise<string> => {
	const { Body } = await s3.send(new GetObjectCommand(at(name)));
	return (await Body?.transformToString()) ?? '';
};

const put = (
	name: string,
	body: string | Uint8Array,
	more: Partial<ConstructorParameters<typeof PutObjectCommand>[0]> = {}
) => s3.send(new PutObjectCommand({ ...at(name), Body: body, ...more }));

const exists = async (name: string): Promise<boolean> =>
	s3.send(new HeadObjectCommand(at(name))).then(
		() => true,
		() => false
	);

describe('objects', () => {
	test('what is put is got, with its type, metadata and hash', async () => {
		await put('plain.txt', 'borage', {
			ContentType: 'text/plain',
			Metadata: { origin: 'test' },
			CacheControl: 'no-store'
		});
		const answer = await s3.send(new GetObjectCommand(at('plain.txt')));
		expect(await answer.Body?.transformToString()).toBe('borage');
		expect(answer).toMatchObject({
			ContentType: 'text/plain',
			Metadata: { origin: 'test' },
			CacheControl: 'no-store',
			ETag: `"${createHash('md5').update('borage').digest('hex')}"`
		});
	});

	test('a range gives its bytes, one outside is refused', async () => {
		await put('range.txt', '0123456789');
		const middle = await s3.send(new GetObjectCommand({ ...at('range.txt'), Range: 'bytes=2-4' }));
		expect(await middle.Body?.transformToString()).toBe('234');
		expect(middle).toMatchObject({ ContentRange: 'bytes 2-4/10', $metadata: { httpStatusCode: 206 } });
		const end = await s3.send(new GetObjectCommand({ ...at('range.txt'), Range: 'bytes=-3' }));
		expect(await end.Body?.transformToString()).toBe('789');
		await expect(s3.send(new GetObjectCommand({ ...at('range.txt'), Range: 'bytes=10-' }))).rejects.toThrow(
			expect.objectContaining({ name: 'InvalidRange' })
		);
	});

	test('an empty object is kept and read', async () => {
		await put('empty', '');
		expect(await textOf('empty')).toBe('');
		expect(await s3.send(new HeadObjectCommand(at('empty')))).toMatchObject({ ContentLength: 0 });
	});

	test('a missing key is NoSuchKey', async () => {
		await expect(s3.send(new GetObjectCommand(at('nowhere')))).rejects.toThrow(
			expect.objectContaining({ name: 'NoSuchKey' })
		);
		await expect(s3.send(new HeadObjectCommand(at('nowhere')))).rejects.toMatchObject({
			$metadata: { httpStatusCode: 404 }
		});
	});

	test('copy keeps or replaces what is said of the object', async () => {
		await put('from', 'tansy', { ContentType: 'text/plain', Metadata: { a: '1' } });
		const CopySource = `${target.bucket}/${prefix}from`;
		await s3.send(new CopyObjectCommand({ ...at('kept'), CopySource }));
		expect(await s3.send(new HeadObjectCommand(at('kept')))).toMatchObject({
			ContentType: 'text/plain',
			Metadata: { a: '1' }
		});
		const replacing = { MetadataDirective: 'REPLACE', ContentType: 'text/csv' } as const;
		await s3.send(new CopyObjectCommand({ ...at('replaced'), CopySource, ...replacing }));
		expect(await s3.send(new HeadObjectCommand(at('replaced')))).toMatchObject({
			ContentType: 'text/csv',
			Metadata: {}
		});
		expect(await textOf('replaced')).toBe('tansy');
	});

	test('delete removes, and removing again is no error', async () => {
		await put('gone', 'x');
		await s3.send(new DeleteObjectCommand(at('gone')));
		await s3.send(new DeleteObjectCommand(at('gone')));
		expect(await exists('gone')).toBe(false);
	});

	test('several are removed at once, whatever their names hold', async () => {
		const names = ['many/a&b<c>', 'many/"quoted"', 'many/é ü'];
		for (const name of names) await put(name, 'x');
		const Objects = names.map((name) => ({ Key: prefix + name }));
		const { Deleted } = await s3.send(new DeleteObjectsCommand({ Bucket: target.bucket, Delete: { Objects } }));
		expect(Deleted?.map(({ Key }) => Key).sort()).toEqual(Objects.map(({ Key }) => Key).sort());
		expect(await exists('many/é ü')).toBe(false);
	});

	test('If-None-Match: * lets only the first writer in', async () => {
		await put('once', 'first', { IfNoneMatch: '*' });
		await expect(put('once', 'second', { IfNoneMatch: '*' })).rejects.toThrow(
			expect.objectContaining({ name: 'PreconditionFailed' })
		);
		expect(await textOf('once')).toBe('first');
	});

	test.each([
		['a b+c', 'spaces and plus'],
		["!'()*~", 'what encodeURIComponent leaves alone'],
		['ünï/β', 'other alphabets'],
		['100%25', 'a percent sign'],
		['a//b', 'an empty step']
	])('the key %s (%s) is one key', async (name) => {
		await put(`odd/${name}`, name);
		expect(await textOf(`odd/${name}`)).toBe(name);
	});
});

describe('listing', () => {
	beforeAll(async () => {
		for (const name of ['a', 'b/1', 'b/2', 'c', 'd/1', 'e']) await put(`list/${name}`, name);
	});

	const pages = async (more: { Delimiter?: string; MaxKeys: number }) => {
		const found: string[] = [];
		let ContinuationToken: string | undefined;
		do {
			const input = { Bucket: target.bucket, Prefix: `${prefix}list/`, ContinuationToken, ...more };
			const page = await s3.send(new ListObjectsV2Command(input));
			expect(page.KeyCount).toBeLessThanOrEqual(more.MaxKeys);
			const names = [
				...(page.Contents ?? []).map(({ Key }) => Key),
				...(page.CommonPrefixes ?? []).map((each) => each.Prefix)
			];
			found.push(...names.map((name) => (name ?? '').slice(prefix.length + 'list/'.length)));
			ContinuationToken = page.NextContinuationToken;
		} while (ContinuationToken);
		return found.sort();
	};

	test('pages hold every key once', async () => {
		expect(await pages({ MaxKeys: 2 })).toEqual(['a', 'b/1', 'b/2', 'c', 'd/1', 'e']);
	});

	test('a delimiter folds groups, over pages too', async () => {
		expect(await pages({ MaxKeys: 2, Delimiter: '/' })).toEqual(['a', 'b/', 'c', 'd/', 'e']);
		expect(await pages({ MaxKeys: 100, Delimiter: '/' })).toEqual(['a', 'b/', 'c', 'd/', 'e']);
	});
});

describe('parts', () => {
	const begin = async (name: string): Promise<string> => {
		const { UploadId } = await s3.send(
			new CreateMultipartUploadCommand({ ...at(name), ContentType: 'application/pdf' })
		);
		return UploadId ?? '';
	};
	const send = async (name: string, UploadId: string, PartNumber: number, Body: Uint8Array, by = s3) => {
		const { ETag } = await by.send(new UploadPartCommand({ ...at(name), UploadId, PartNumber, Body }));
		return { ETag, PartNumber };
	};
	const complete = (name: string, UploadId: string, Parts: { ETag: string | undefined; PartNumber: number }[]) =>
		s3.send(new CompleteMultipartUploadCommand({ ...at(name), UploadId, MultipartUpload: { Parts } }));

	test('13 MiB in two parts come back whole', async () => {
		const content = randomBytes(13 * MIB);
		const id = await begin('large');
		const second = await send('large', id, 2, content.subarray(8 * MIB));
		const first = await send('large', id, 1, content.subarray(0, 8 * MIB));
		const { Parts } = await s3.send(new ListPartsCommand({ ...at('large'), UploadId: id }));
		expect(Parts?.map(({ PartNumber, Size }) => [PartNumber, Size])).toEqual([
			[1, 8 * MIB],
			[2, 5 * MIB]
		]);
		expect(await exists('large')).toBe(false);
		const { ETag } = await complete('large', id, [first, second]);
		expect(ETag).toMatch(/^"[0-9a-f]{32}-2"$/);
		const answer = await s3.send(new GetObjectCommand(at('large')));
		expect(answer.ContentType).toBe('application/pdf');
		const hash = createHash('sha256');
		for await (const piece of answer.Body as Readable) hash.update(piece);
		expect(hash.digest('hex')).toBe(createHash('sha256').update(content).digest('hex'));
	});

	test('a part sent again replaces the one before', async () => {
		const id = await begin('again');
		await send('again', id, 1, Buffer.from('old'));
		const part = await send('again', id, 1, Buffer.from('new'));
		await complete('again', id, [part]);
		expect(await textOf('again')).toBe('new');
	});

	test('wrong hash, wrong order and a small part that is not the last are refused', async () => {
		const id = await begin('wrong');
		const one = await send('wrong', id, 1, Buffer.from('small'));
		const two = await send('wrong', id, 2, Buffer.from('other'));
		await expect(complete('wrong', id, [{ ...one, ETag: two.ETag }])).rejects.toThrow(
			expect.objectContaining({ name: 'InvalidPart' })
		);
		await expect(complete('wrong', id, [two, one])).rejects.toThrow(
			expect.objectContaining({ name: 'InvalidPartOrder' })
		);
		await expect(complete('wrong', id, [one, two])).rejects.toThrow(
			expect.objectContaining({ name: 'EntityTooSmall' })
		);
		await s3.send(new AbortMultipartUploadCommand({ ...at('wrong'), UploadId: id }));
	});

	test('abort leaves nothing, and parts sent later are NoSuchUpload', async () => {
		const id = await begin('aborted');
		await send('aborted', id, 1, Buffer.from('x'));
		await s3.send(new AbortMultipartUploadCommand({ ...at('aborted'), UploadId: id }));
		await expect(send('aborted', id, 2, Buffer.from('y'))).rejects.toThrow(
			expect.objectContaining({ name: 'NoSuchUpload' })
		);
		const { Uploads } = await s3.send(new ListMultipartUploadsCommand({ Bucket: target.bucket, Prefix: prefix }));
		expect((Uploads ?? []).map(({ UploadId }) => UploadId)).not.toContain(id);
	});

	test('parts with checksums are joined as well', async () => {
		const by = client('WHEN_SUPPORTED');
		const name = 'summed';
		const { UploadId = '' } = await by.send(new CreateMultipartUploadCommand(at(name)));
		const answer = await by.send(
			new UploadPartCommand({
				...at(name),
				UploadId,
				PartNumber: 1,
				Body: Buffer.from('one'),
				ChecksumAlgorithm: 'CRC32'
			})
		);
		const { ETag, ChecksumCRC32 } = answer;
		expect(ChecksumCRC32).toBeDefined();
		const Parts = [{ PartNumber: 1, ETag, ChecksumCRC32 }];
		await by.send(new CompleteMultipartUploadCommand({ ...at(name), UploadId, MultipartUpload: { Parts } }));
		by.destroy();
		expect(await textOf(name)).toBe('one');
	});
});

describe('checksums', () => {
	const ALGORITHMS: readonly ChecksumAlgorithm[] = ['CRC32', 'CRC32C', 'CRC64NVME', 'SHA1', 'SHA256'];

	test.each(ALGORITHMS)('%s in a header', async (ChecksumAlgorithm) => {
		const by = client('WHEN_SUPPORTED');
		await by.send(new PutObjectCommand({ ...at(`sum/${ChecksumAlgorithm}`), Body: 'woad', ChecksumAlgorithm }));
		const answer = await by.send(new GetObjectCommand({ ...at(`sum/${ChecksumAlgorithm}`), ChecksumMode: 'ENABLED' }));
		expect(await answer.Body?.transformToString()).toBe('woad');
		by.destroy();
	});

	// A stream travels as aws-chunked; its checksum follows in the trailer.
	test.each(ALGORITHMS)('%s in the trailer of a stream', async (ChecksumAlgorithm) => {
		const by = client('WHEN_SUPPORTED');
		const Body = Readable.from([Buffer.from('first,'), Buffer.from('second')]);
		const more = { ContentEncoding: 'gzip', ContentLength: 12, ChecksumAlgorithm };
		await by.send(new PutObjectCommand({ ...at(`trail/${ChecksumAlgorithm}`), Body, ...more }));
		const answer = await by.send(
			new GetObjectCommand({ ...at(`trail/${ChecksumAlgorithm}`), ChecksumMode: 'ENABLED' })
		);
		expect(answer.ContentEncoding).toBe('gzip');
		expect(await answer.Body?.transformToString()).toBe('first,second');
		by.destroy();
	});

	test.each([
		['ChecksumCRC32', 'AAAAAA=='],
		['ChecksumSHA256', `${'A'.repeat(43)}=`]
	])('a wrong %s is refused and nothing is kept', async (member, value) => {
		await expect(put(`sum/wrong-${member}`, 'woad', { [member]: value })).rejects.toMatchObject({
			$metadata: { httpStatusCode: 400 }
		});
		expect(await exists(`sum/wrong-${member}`)).toBe(false);
	});

	test('a stream without checksums is taken too', async () => {
		await s3.send(
			new PutObjectCommand({ ...at('stream'), Body: Readable.from([Buffer.from('abc')]), ContentLength: 3 })
		);
		expect(await textOf('stream')).toBe('abc');
	});
});

describe('who may', () => {
	const statusOf = async (address: string, init: RequestInit = {}): Promise<number> =>
		(await fetch(address, init)).status;

	const signed = async (name: string, more: object = {}, expiresIn = 60): Promise<string> =>
		getSignedUrl(s3, new GetObjectCommand({ ...at(name), ...more }), { expiresIn });

	beforeAll(async () => {
		await put('secret.txt', 'madder', { ContentType: 'text/html' });
		await put('other.txt', 'other');
	});

	test('a signed address gives the content with the type and name it forces', async () => {
		const address = await signed('secret.txt', {
			ResponseContentType: 'application/pdf',
			ResponseContentDisposition: `attachment; filename="a.pdf"; filename*=UTF-8''%C3%A9.pdf`
		});
		const answer = await fetch(address);
		expect(await answer.text()).toBe('madder');
		expect(answer.headers.get('content-type')).toBe('application/pdf');
		expect(answer.headers.get('content-disposition')).toBe(`attachment; filename="a.pdf"; filename*=UTF-8''%C3%A9.pdf`);
	});

	test.each([
		['another key', (address: string) => address.replace('secret.txt', 'other.txt')],
		['another type', (address: string) => address.replace('text%2Fplain', 'text%2Fhtml')],
		['a longer life', (address: string) => address.replace('X-Amz-Expires=60', 'X-Amz-Expires=600')],
		['one parameter more', (address: string) => `${address}&response-cache-control=public`],
		['no signature', (address: string) => address.replace(/&X-Amz-Signature=[0-9a-f]+/, '')],
		['no query', (address: string) => address.replace(/\?.*$/, '')]
	])('a signed address changed to %s is refused', async (_what, tamper) => {
		const address = await signed('secret.txt', { ResponseContentType: 'text/plain' });
		expect(tamper(address)).not.toBe(address);
		expect([400, 403]).toContain(await statusOf(tamper(address)));
		expect(await statusOf(address)).toBe(200);
	});

	test('a signed address for reading does not write or remove', async () => {
		const address = await signed('secret.txt');
		expect(await statusOf(address, { method: 'PUT', body: 'x' })).toBe(403);
		expect(await statusOf(address, { method: 'DELETE' })).toBe(403);
		expect(await textOf('secret.txt')).toBe('madder');
	});

	test('an address whose time is over is refused', async () => {
		const past = new Date(Date.now() - 120_000);
		const address = await getSignedUrl(s3, new GetObjectCommand(at('secret.txt')), {
			expiresIn: 60,
			signingDate: past
		});
		expect(await statusOf(address)).toBe(403);
	});

	test('a signed address for writing takes one body', async () => {
		const address = await getSignedUrl(s3, new PutObjectCommand(at('by-address')), { expiresIn: 60 });
		expect(await statusOf(address, { method: 'PUT', body: 'sent' })).toBe(200);
		expect(await textOf('by-address')).toBe('sent');
	});

	test('wrong keys are refused', async () => {
		const wrongSecret = client('WHEN_REQUIRED', { accessKeyId: target.accessKeyId, secretAccessKey: 'another' });
		await expect(wrongSecret.send(new GetObjectCommand(at('secret.txt')))).rejects.toThrow(
			expect.objectContaining({ name: 'SignatureDoesNotMatch' })
		);
		wrongSecret.destroy();
		const wrongKey = client('WHEN_REQUIRED', { accessKeyId: 'AKIANOBODY0000000000', secretAccessKey: 'another' });
		await expect(wrongKey.send(new GetObjectCommand(at('secret.txt')))).rejects.toMatchObject({
			$metadata: { httpStatusCode: 403 }
		});
		wrongKey.destroy();
	});
});
