import type { IncomingMessage, ServerResponse } from 'node:http';
import type { Address } from './address';
import type { Uploads } from './multipart';
import { Problem } from './problem';
import type { Body } from './payload';
import type { Headers } from './sigv4';
import type { About, Store } from './store';
import { xmlDocument, type Element } from './xml';

/** One verified request and what its operation may use. */
export interface Call {
	readonly method: string;
	readonly address: Address;
	/** Empty for an operation on the bucket itself. */
	readonly key: string;
	readonly headers: Headers;
	readonly body: Body;
	readonly response: ServerResponse;
	readonly bucket: string;
	readonly store: Store;
	readonly uploads: Uploads;
}

export type Operation = (call: Call) => Promise<void>;

/** Repeated headers are joined by a comma without a space, the form in which they are signed. */
export function headersOf(request: IncomingMessage): Headers {
	return new Map(Object.entries(request.headersDistinct).map(([name, values]) => [name, (values ?? []).join(',')]));
}

export function sendXml(response: ServerResponse, root: Element, status = 200): void {
	const text = xmlDocument(root);
	response.writeHead(status, { 'content-type': 'application/xml', 'content-length': Buffer.byteLength(text) });
	response.end(text);
}

export function sendEmpty(response: ServerResponse, status: number, headers: Record<string, string> = {}): void {
	response.writeHead(status, { ...headers, ...(status === 204 ? {} : { 'content-length': '0' }) });
	response.end();
}

const KEPT_HEADERS = ['content-type', 'content-disposition', 'content-language', 'cache-control', 'expires'] as const;
const META = 'x-amz-meta-';

/** What the request says about the object it writes; `aws-chunked` is the transfer's, not the object's. */
export function aboutOf(headers: Headers, checksums: Readonly<Record<string, string>>): About {
	const kept = KEPT_HEADERS.flatMap((name) => {
		const value = headers.get(name);
		return value === undefined ? [] : [[name, value] as const];
	});
	const encoding = (headers.get('content-encoding') ?? '')
		.split(',')
		.map((each) => each.trim())
		.filter((each) => each !== '' && each !== 'aws-chunked')
		.join(', ');
	const meta = [...headers]
		.filter(([name]) => name.startsWith(META))
		.map(([name, value]) => [name.slice(META.length), value]);
	return {
		headers: Object.fromEntries(encoding === '' ? kept : [...kept, ['content-encoding', encoding]]),
		meta: Object.fromEntries(meta),
		checksums
	};
}

/** If-None-Match on a write knows only `*`: anything else would be guessed at. */
export function onlyNew(headers: Headers): boolean {
	const condition = headers.get('if-none-match');
	if (condition !== undefined && condition !== '*')
		throw new Problem('NotImplemented', 'Only If-None-Match: * is understood.');
	if (headers.has('if-match')) throw new Problem('NotImplemented', 'If-Match is not understood on a write.');
	return condition === '*';
}
