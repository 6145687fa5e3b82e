import { validateHeaderValue } from 'node:http';
import { pipeline } from 'node:stream/promises';
import { queryValue, type Query } from './address';
import { sendEmpty, type Call } from './call';
import { Problem } from './problem';
import type { Headers } from './sigv4';
import type { ByteRange, StoredObject } from './store';

const OVERRIDES = [
	'content-type',
	'content-disposition',
	'content-language',
	'content-encoding',
	'cache-control',
	'expires'
] as const;

/** The response-* parameters; a value that could not stand in a header is refused rather than cut. */
function overridesOf(query: Query): Record<string, string> {
	const given = OVERRIDES.flatMap((name) => {
		const value = queryValue(query, `response-${name}`);
		if (value === undefined) return [];
		try {
			validateHeaderValue(name, value);
		} catch {
			throw new Problem('InvalidArgument', `response-${name} holds a character that no header may carry.`);
		}
		return [[name, value] as const];
	});
	return Object.fromEntries(given);
}

/** One range is honoured; several, or another unit, are ignored as HTTP allows. */
export function rangeOf(header: string | undefined, bytes: number): ByteRange | null {
	const match = /^bytes=(\d*)-(\d*)$/.exec(header ?? '');
	if (!match || (match[1] === '' && match[2] === '')) return null;
	const [, first = '', last = ''] = match;
	const start = first === '' ? Math.max(0, bytes - Number(last)) : Number(first);
	const end = first === '' || last === '' ? bytes - 1 : Math.min(Number(last), bytes - 1);
	if (start > end) throw new Problem('InvalidRange', 'The range lies outside the object.');
	return { start, end };
}

function assertConditions(headers: Headers, object: StoredObject): void {
	const quoted = `"${object.etag}"`;
	const names = (value: string) => value.split(',').map((each) => each.trim());
	const match = headers.get('if-match');
	if (match !== undefined && match !== '*' && !names(match).includes(quoted)) {
		throw new Problem('PreconditionFailed', 'The object has another ETag.');
	}
	const none = headers.get('if-none-match');
	if (none !== undefined && (none === '*' || names(none).includes(quoted))) {
		throw new Problem('NotModified', 'The object has not changed.');
	}
}

function headersFor(call: Call, object: StoredObject, range: ByteRange | null): Record<string, string> {
	const meta = Object.entries(object.meta).map(([name, value]) => [`x-amz-meta-${name}`, value]);
	const asked = call.headers.get('x-amz-checksum-mode') === 'ENABLED' && range === null;
	const checksums = asked
		? Object.entries(object.checksums).map(([name, value]) => [`x-amz-checksum-${name}`, value])
		: [];
	return {
		'content-type': 'binary/octet-stream',
		...object.headers,
		...Object.fromEntries([...meta, ...checksums]),
		...overridesOf(call.address.query),
		etag: `"${object.etag}"`,
		'last-modified': new Date(object.modified).toUTCString(),
		'accept-ranges': 'bytes',
		'x-content-type-options': 'nosniff',
		'content-length': String(range ? range.end - range.start + 1 : object.bytes),
		...(range ? { 'content-range': `bytes ${range.start}-${range.end}/${object.bytes}` } : {})
	};
}

export async function headObject(call: Call): Promise<void> {
	const object = call.store.find(call.key);
	assertConditions(call.headers, object);
	const range = rangeOf(call.headers.get('range'), object.bytes);
	call.response.writeHead(range ? 206 : 200, headersFor(call, object, range));
	call.response.end();
}

export async function getObject(call: Call): Promise<void> {
	const object = call.store.find(call.key);
	assertConditions(call.headers, object);
	const range = rangeOf(call.headers.get('range'), object.bytes);
	const headers = headersFor(call, object, range);
	if (object.bytes === 0) return sendEmpty(call.response, 200, headers);
	const content = await call.store.read(object, range ?? undefined);
	call.response.writeHead(range ? 206 : 200, headers);
	await pipeline(content, call.response);
}
