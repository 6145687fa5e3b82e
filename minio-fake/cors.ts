import type { ServerResponse } from 'node:http';
import { sendEmpty } from './call';
import { Problem } from './problem';
import type { Headers } from './sigv4';

const METHODS = ['GET', 'HEAD', 'PUT', 'POST', 'DELETE'];
const EXPOSED = 'ETag, Content-Length, Content-Range, Content-Disposition';
const SECONDS_KEPT = '600';

/** Lets a listed origin read the answer; says nothing to any other. */
export function allowOrigin(response: ServerResponse, headers: Headers, origins: readonly string[]): void {
	response.setHeader('vary', 'Origin');
	const origin = headers.get('origin');
	if (origin === undefined || !origins.includes(origin)) return;
	response.setHeader('access-control-allow-origin', origin);
	response.setHeader('access-control-expose-headers', EXPOSED);
}

export function answerPreflight(response: ServerResponse, headers: Headers, origins: readonly string[]): void {
	const origin = headers.get('origin') ?? '';
	const method = headers.get('access-control-request-method') ?? '';
	if (!origins.includes(origin) || !METHODS.includes(method)) {
		throw new Problem('AccessForbidden', 'This origin may not send this request.');
	}
	sendEmpty(response, 204, {
		'access-control-allow-methods': METHODS.join(', '),
		'access-control-allow-headers': headers.get('access-control-request-headers') ?? '',
		'access-control-max-age': SECONDS_KEPT
	});
}
