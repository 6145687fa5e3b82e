import { buffer } from 'node:stream/consumers';
import type { FileFacts } from '../db/documents';
import type { UploadRow } from '../db/uploads';
import { Refused } from '../refused';
import type { Bucket } from '../storage/bucket';
import { digest } from '../storage/hash';
import { inspectPdf, type PdfFacts } from '../storage/inspect-pdf';
import { contentKey, uploadKey } from '../storage/keys';
import { mediaTypeOf } from '../storage/kinds';
import { sniff } from '../storage/sniff';
import { kindNotTaken } from '../storage/upload-rules';

const NO_PDF: PdfFacts = { pages: null, encrypted: false, broken: false };

/** The PDF is read in pieces from the bucket: only its tables are needed, never its whole content. */
const inspectStored = (bucket: Bucket, key: string, bytes: number): Promise<PdfFacts> =>
	inspectPdf({
		bytes,
		async read(start, end) {
			const piece = await bucket.get(key, { start, end: end - 1 });
			if (!piece) throw new Error(`The bucket lost ${key}.`);
			return new Uint8Array(await buffer(piece.body));
		}
	});

/**
 * From parts to content: joins them, reads the whole once for hash and kind, and copies it to its own place.
 * @throws Refused 'upload-broken' when the length is not the announced one, 'kind-not-taken'.
 */
export async function takeIn(bucket: Bucket, upload: UploadRow): Promise<FileFacts> {
	const key = uploadKey(upload.id);
	const parts = upload.parts.toSorted((a, b) => a.number - b.number);
	await bucket.completeParts(key, upload.s3UploadId, parts);
	const content = await bucket.get(key);
	if (!content) throw new Refused('upload-broken', { name: upload.name });
	const { sha256, bytes, head } = await digest(content.body);
	if (bytes !== upload.expectedBytes) {
		throw new Refused('upload-broken', { name: upload.name, bytes, limit: upload.expectedBytes });
	}
	const found = await sniff(head, upload.name);
	if (!found.taken) {
		const refusal = kindNotTaken(upload.name, found.found);
		throw new Refused(refusal.code, refusal.data);
	}
	const mediaType = mediaTypeOf(found.kind);
	const pdf = found.kind === 'pdf' ? await inspectStored(bucket, key, bytes) : NO_PDF;
	const place = contentKey(sha256);
	// The same content is there already when somebody sent it before.
	if ((await bucket.head(place))?.bytes !== bytes) await bucket.copy(key, place, mediaType);
	return { sha256, bytes, mediaType, ...pdf };
}
