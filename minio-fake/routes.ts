import { hasQuery, queryValue, type Address } from './address';
import { sendEmpty, type Call, type Operation } from './call';
import { listObjects } from './listing';
import { abortUpload, completeUpload, createUpload, listParts, listUploads, uploadPart } from './parts';
import { Problem } from './problem';
import { getObject, headObject } from './reading';
import type { Headers } from './sigv4';
import { copyObject, deleteObject, deleteObjects, putObject } from './writing';

interface Route {
	readonly method: string;
	readonly on: 'object' | 'bucket';
	/** Parameters that must be there and mark the operation. */
	readonly marks: readonly string[];
	/** Parameters that may be there. */
	readonly may?: readonly string[];
	readonly copies?: boolean;
	readonly run: Operation;
}

const RESPONSE_OVERRIDES = ['type', 'disposition', 'language', 'encoding']
	.map((name) => `response-content-${name}`)
	.concat('response-cache-control', 'response-expires');

const headBucket = async (call: Call): Promise<void> => sendEmpty(call.response, 200);

const ROUTES: readonly Route[] = [
	{ method: 'PUT', on: 'object', marks: ['partNumber', 'uploadId'], run: uploadPart },
	{ method: 'PUT', on: 'object', marks: [], copies: true, run: copyObject },
	{ method: 'PUT', on: 'object', marks: [], run: putObject },
	{ method: 'GET', on: 'object', marks: ['uploadId'], run: listParts },
	{ method: 'GET', on: 'object', marks: [], may: RESPONSE_OVERRIDES, run: getObject },
	{ method: 'HEAD', on: 'object', marks: [], may: RESPONSE_OVERRIDES, run: headObject },
	{ method: 'DELETE', on: 'object', marks: ['uploadId'], run: abortUpload },
	{ method: 'DELETE', on: 'object', marks: [], run: deleteObject },
	{ method: 'POST', on: 'object', marks: ['uploads'], run: createUpload },
	{ method: 'POST', on: 'object', marks: ['uploadId'], run: completeUpload },
	{ method: 'POST', on: 'bucket', marks: ['delete'], run: deleteObjects },
	{ method: 'GET', on: 'bucket', marks: ['uploads'], may: ['prefix'], run: listUploads },
	{
		method: 'GET',
		on: 'bucket',
		marks: ['list-type'],
		may: ['prefix', 'delimiter', 'max-keys', 'continuation-token', 'start-after', 'encoding-type'],
		run: listObjects
	},
	{ method: 'HEAD', on: 'bucket', marks: [], run: headBucket }
];

/** Part of every request's machinery, whatever the operation. */
const isCommonParameter = (name: string): boolean =>
	name === 'x-id' ||
	name.startsWith('X-Amz-') ||
	name.startsWith('x-amz-checksum-') ||
	name === 'x-amz-sdk-checksum-algorithm';

const KNOWN_AMZ_HEADERS = new Set([
	'x-amz-checksum-algorithm',
	'x-amz-checksum-mode',
	'x-amz-checksum-type',
	'x-amz-content-sha256',
	'x-amz-copy-source',
	'x-amz-date',
	'x-amz-decoded-content-length',
	'x-amz-metadata-directive',
	'x-amz-sdk-checksum-algorithm',
	'x-amz-trailer',
	'x-amz-user-agent'
]);

const isKnownHeader = (name: string): boolean =>
	!name.startsWith('x-amz-') ||
	KNOWN_AMZ_HEADERS.has(name) ||
	/^x-amz-(meta-.+|checksum-(crc32|crc32c|crc64nvme|sha1|sha256))$/.test(name);

/**
 * The operation a request asks for. Whatever is not known here is refused instead of guessed: a call that is
 * silently half done would pass against the stand-in and fail against a real bucket.
 */
export function operationFor(method: string, address: Address, headers: Headers): Operation {
	const refuse = (what: string) => new Problem('NotImplemented', `The stand-in does not know ${what}.`);
	const stranger = [...headers.keys()].find((name) => !isKnownHeader(name));
	if (stranger !== undefined) throw refuse(`the header ${stranger}`);
	const named = address.query.map(([name]) => name).filter((name) => !isCommonParameter(name));
	const copies = headers.has('x-amz-copy-source');
	const route = ROUTES.find(
		(each) =>
			each.method === method &&
			each.on === (address.key === null ? 'bucket' : 'object') &&
			(each.copies ?? false) === copies &&
			each.marks.every((name) => hasQuery(address.query, name)) &&
			named.every((name) => each.marks.includes(name) || (each.may ?? []).includes(name))
	);
	const listVersion = queryValue(address.query, 'list-type');
	if (!route || (listVersion !== undefined && listVersion !== '2')) {
		throw refuse(`${method} with the parameters [${named.join(', ')}]`);
	}
	return route.run;
}
