import { Readable } from 'node:stream';
import {
	AbortMultipartUploadCommand,
	CompleteMultipartUploadCommand,
	CopyObjectCommand,
	CreateMultipartUploadCommand,
	DeleteObjectCommand,
	GetObjectCommand,
	HeadBucketCommand,
	HeadObjectCommand,
	ListMultipartUploadsCommand,
	ListObjectsV2Command,
	PutObjectCommand,
	S3Client,
	S3ServiceException,
	UploadPartCommand
} from '@aws-sdk/client-s3';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { config, type StorageConfig } from '../config';
import { contentDisposition, type Disposition } from './disposition';
import { contentKey } from './keys';
import { FILE_KINDS, kindOfMediaType } from './kinds';

/** `publicEndpoint`: the bucket's address as browsers reach it, where it differs from the server's own way there. */
export type BucketConfig = StorageConfig & { readonly publicEndpoint?: string };

export interface ObjectHead {
	readonly bytes: number;
	readonly mediaType: string;
	/** Without quotation marks. */
	readonly etag: string;
}

export interface ObjectContent extends ObjectHead {
	readonly body: Readable;
}

export interface PartRef {
	readonly number: number;
	readonly etag: string;
}

export interface ListedObject {
	readonly key: string;
	readonly written: Date;
}

export interface UnfinishedUpload {
	readonly key: string;
	readonly uploadId: string;
	readonly begun: Date;
}

export interface Download {
	readonly fileName: string;
	readonly mediaType: string;
	readonly disposition: Disposition;
	/** How long the address works; it is meant to be followed at once. */
	readonly seconds: number;
}

const LONGEST_DOWNLOAD_SECONDS = 15 * 60;

const clientFor = (settings: BucketConfig, endpoint: string | undefined): S3Client =>
	new S3Client({
		region: settings.region,
		forcePathStyle: settings.forcePathStyle,
		credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey },
		// By default a signed address would carry the checksum of an empty body, and older buckets refuse trailers.
		requestChecksumCalculation: 'WHEN_REQUIRED',
		responseChecksumValidation: 'WHEN_REQUIRED',
		...(endpoint === undefined ? {} : { endpoint })
	});

const isMissing = (error: unknown): boolean =>
	error instanceof S3ServiceException && error.$metadata.httpStatusCode === 404 && error.name !== 'NoSuchBucket';

async function orNull<T>(answer: Promise<T>): Promise<T | null> {
	try {
		return await answer;
	} catch (error) {
		if (isMissing(error)) return null;
		throw error;
	}
}

const bare = (etag: string | undefined): string => (etag ?? '').replaceAll('"', '');

const headOf = (answer: { ContentLength?: number; ContentType?: string; ETag?: string }): ObjectHead => ({
	bytes: answer.ContentLength ?? 0,
	mediaType: answer.ContentType ?? 'application/octet-stream',
	etag: bare(answer.ETag)
});

/** One S3 bucket. Every method is one request; nothing is kept between two of them. */
export class Bucket {
	readonly #client: S3Client;
	readonly #signer: S3Client;
	readonly #name: string;

	constructor(settings: BucketConfig) {
		this.#client = clientFor(settings, settings.endpoint);
		const { publicEndpoint } = settings;
		this.#signer = publicEndpoint === undefined ? this.#client : clientFor(settings, publicEndpoint);
		this.#name = settings.bucket;
	}

	/** Whether the bucket answers at all; for the health check. */
	async answers(): Promise<boolean> {
		try {
			await this.#client.send(new HeadBucketCommand({ Bucket: this.#name }));
			return true;
		} catch {
			return false;
		}
	}

	async put(key: string, body: Uint8Array, mediaType: string): Promise<void> {
		const object = { Bucket: this.#name, Key: key, Body: body, ContentType: mediaType };
		await this.#client.send(new PutObjectCommand(object));
	}

	/** Null when there is no such object. `range` is inclusive, in bytes. */
	async get(key: string, range?: { readonly start: number; readonly end: number }): Promise<ObjectContent | null> {
		const Range = range && `bytes=${range.start}-${range.end}`;
		const answer = await orNull(this.#client.send(new GetObjectCommand({ Bucket: this.#name, Key: key, Range })));
		if (!answer) return null;
		if (!(answer.Body instanceof Readable)) throw new Error(`The bucket answered ${key} without a body.`);
		return { ...headOf(answer), body: answer.Body };
	}

	async head(key: string): Promise<ObjectHead | null> {
		const answer = await orNull(this.#client.send(new HeadObjectCommand({ Bucket: this.#name, Key: key })));
		return answer && headOf(answer);
	}

	/** Within the bucket, without the content travelling; the copy gets the media type named here. */
	async copy(from: string, to: string, mediaType: string): Promise<void> {
		const source = [this.#name, ...from.split('/')].map(encodeURIComponent).join('/');
		const about = { MetadataDirective: 'REPLACE', ContentType: mediaType } as const;
		await this.#client.send(new CopyObjectCommand({ Bucket: this.#name, Key: to, CopySource: source, ...about }));
	}

	/** Removing what is not there is no error. */
	async delete(key: string): Promise<void> {
		await this.#client.send(new DeleteObjectCommand({ Bucket: this.#name, Key: key }));
	}

	async beginParts(key: string): Promise<string> {
		const { UploadId } = await this.#client.send(new CreateMultipartUploadCommand({ Bucket: this.#name, Key: key }));
		if (!UploadId) throw new Error('The bucket began an upload without naming it.');
		return UploadId;
	}

	/** Sending a number again replaces that part. Null when the upload is no longer under way. */
	async putPart(key: string, uploadId: string, number: number, body: Uint8Array): Promise<PartRef | null> {
		const part = { Bucket: this.#name, Key: key, UploadId: uploadId, PartNumber: number, Body: body };
		const answer = await orNull(this.#client.send(new UploadPartCommand(part)));
		return answer && { number, etag: bare(answer.ETag) };
	}

	async completeParts(key: string, uploadId: string, parts: readonly PartRef[]): Promise<void> {
		const Parts = parts.map(({ number, etag }) => ({ PartNumber: number, ETag: `"${etag}"` }));
		const upload = { Bucket: this.#name, Key: key, UploadId: uploadId, MultipartUpload: { Parts } };
		await this.#client.send(new CompleteMultipartUploadCommand(upload));
	}

	/** Aborting what has ended is no error. */
	async abortParts(key: string, uploadId: string): Promise<void> {
		const upload = { Bucket: this.#name, Key: key, UploadId: uploadId };
		await orNull(this.#client.send(new AbortMultipartUploadCommand(upload)));
	}

	/** Objects below a prefix with the time of their writing; the first thousand, which a sweep may repeat. */
	async list(prefix: string): Promise<readonly ListedObject[]> {
		const answer = await this.#client.send(new ListObjectsV2Command({ Bucket: this.#name, Prefix: prefix }));
		return (answer.Contents ?? []).flatMap(({ Key, LastModified }) =>
			Key && LastModified ? [{ key: Key, written: LastModified }] : []
		);
	}

	/** Uploads under way below a prefix; the first thousand, which a sweep may repeat. */
	async unfinished(prefix: string): Promise<readonly UnfinishedUpload[]> {
		const answer = await this.#client.send(new ListMultipartUploadsCommand({ Bucket: this.#name, Prefix: prefix }));
		return (answer.Uploads ?? []).flatMap(({ Key, UploadId, Initiated }) =>
			Key && UploadId && Initiated ? [{ key: Key, uploadId: UploadId, begun: Initiated }] : []
		);
	}

	/**
	 * An address for one download of stored content, valid for some seconds. It forces the media type and the
	 * disposition, both under the signature; only kinds that run nothing may be shown inline.
	 */
	signedDownload(sha256: string, { fileName, mediaType, disposition, seconds }: Download): Promise<string> {
		const kind = kindOfMediaType(mediaType);
		const shown = kind !== null && FILE_KINDS[kind].inline ? disposition : 'attachment';
		const command = new GetObjectCommand({
			Bucket: this.#name,
			Key: contentKey(sha256),
			ResponseContentType: mediaType,
			ResponseContentDisposition: contentDisposition(shown, fileName),
			ResponseCacheControl: 'private, no-store'
		});
		return getSignedUrl(this.#signer, command, { expiresIn: Math.min(seconds, LONGEST_DOWNLOAD_SECONDS) });
	}

	close(): void {
		this.#client.destroy();
		if (this.#signer !== this.#client) this.#signer.destroy();
	}
}

let opened: Bucket | undefined;

/** The bucket of this process, from the configuration. */
export function bucket(): Bucket {
	opened ??= new Bucket(config().storage);
	return opened;
}

export function closeBucket(): void {
	opened?.close();
	opened = undefined;
}
