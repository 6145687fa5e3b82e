import { queryValue } from './address';
import { aboutOf, onlyNew, sendEmpty, sendXml, type Call } from './call';
import { CHECKSUM_NAMES } from './checksums';
import { partNumberOf, type NamedPart } from './multipart';
import { Problem } from './problem';
import { checksumHeaders, DOCUMENT_LIMIT } from './writing';
import { childrenOf, childText, parseXml, type Node } from './xml';

const uploadOf = (call: Call) => call.uploads.find(queryValue(call.address.query, 'uploadId') ?? '', call.key);

export async function createUpload(call: Call): Promise<void> {
	const upload = await call.uploads.begin(call.key, aboutOf(call.headers, {}));
	sendXml(call.response, [
		'InitiateMultipartUploadResult',
		[
			['Bucket', call.bucket],
			['Key', call.key],
			['UploadId', upload.id]
		]
	]);
}

export async function uploadPart(call: Call): Promise<void> {
	const number = partNumberOf(queryValue(call.address.query, 'partNumber') ?? '');
	const upload = await uploadOf(call);
	call.body.assertLength();
	const part = await call.uploads.part(upload, number, call.body);
	sendEmpty(call.response, 200, { etag: `"${part.etag}"`, ...checksumHeaders(part) });
}

function namedPart(node: Node): NamedPart {
	const checksums = CHECKSUM_NAMES.flatMap((name) => {
		const value = childText(node, `Checksum${name.toUpperCase()}`);
		return value === undefined ? [] : [[name, value] as const];
	});
	return {
		number: partNumberOf(childText(node, 'PartNumber') ?? ''),
		etag: (childText(node, 'ETag') ?? '').replaceAll('"', ''),
		checksums: Object.fromEntries(checksums)
	};
}

export async function completeUpload(call: Call): Promise<void> {
	const upload = await uploadOf(call);
	const request = parseXml(await call.body.text(DOCUMENT_LIMIT));
	if (request.name !== 'CompleteMultipartUpload') throw new Problem('MalformedXML', 'Another document was expected.');
	const named = childrenOf(request, 'Part').map(namedPart);
	const object = await call.uploads.complete(upload, named, onlyNew(call.headers));
	sendXml(call.response, [
		'CompleteMultipartUploadResult',
		[
			['Bucket', call.bucket],
			['Key', call.key],
			['ETag', `"${object.etag}"`]
		]
	]);
}

export async function abortUpload(call: Call): Promise<void> {
	await call.uploads.abort(await uploadOf(call));
	sendEmpty(call.response, 204);
}

export async function listParts(call: Call): Promise<void> {
	const upload = await uploadOf(call);
	const parts = await call.uploads.parts(upload);
	sendXml(call.response, [
		'ListPartsResult',
		[
			['Bucket', call.bucket],
			['Key', call.key],
			['UploadId', upload.id],
			['IsTruncated', false],
			...parts.map(
				(part) =>
					[
						'Part',
						[
							['PartNumber', part.number],
							['LastModified', part.modified],
							['ETag', `"${part.etag}"`],
							['Size', part.bytes]
						]
					] as const
			)
		]
	]);
}

export async function listUploads(call: Call): Promise<void> {
	const prefix = queryValue(call.address.query, 'prefix') ?? '';
	const uploads = (await call.uploads.list()).filter((upload) => upload.key.startsWith(prefix));
	sendXml(call.response, [
		'ListMultipartUploadsResult',
		[
			['Bucket', call.bucket],
			['Prefix', prefix],
			['IsTruncated', false],
			...uploads.map(
				(upload) =>
					[
						'Upload',
						[
							['Key', upload.key],
							['UploadId', upload.id],
							['Initiated', upload.begun]
						]
					] as const
			)
		]
	]);
}
