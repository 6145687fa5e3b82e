import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import { hasQuery, queryValue, type Address, type Query } from './address';
import { Problem } from './problem';

export type Headers = ReadonlyMap<string, string>;

export interface Keys {
	readonly accessKeyId: string;
	readonly secretAccessKey: string;
	readonly region: string;
}

/** What later checks need of a verified signature: signed chunks continue its chain. */
export interface Verified {
	/** The value of x-amz-content-sha256, or UNSIGNED-PAYLOAD for a signed address. */
	readonly payload: string;
	readonly signature: string;
	readonly date: string;
	readonly scope: string;
	readonly signingKey: Buffer;
}

interface Claim {
	readonly credential: string;
	readonly signedHeaders: readonly string[];
	readonly signature: string;
	readonly date: string;
	readonly payload: string;
}

const ALGORITHM = 'AWS4-HMAC-SHA256';
const SKEW_MS = 15 * 60 * 1000;
const LONGEST_SECONDS = 7 * 24 * 60 * 60;

export const sha256Hex = (data: string | Uint8Array): string => createHash('sha256').update(data).digest('hex');
export const hmacHex = (key: Buffer, text: string): string => createHmac('sha256', key).update(text).digest('hex');

/** encodeURIComponent leaves `!'()*` alone; the signature's canonical form does not. */
export const encodeRfc3986 = (text: string): string =>
	encodeURIComponent(text).replace(/[!'()*]/g, (char) => `%${char.charCodeAt(0).toString(16).toUpperCase()}`);

export function sameSignature(expected: string, given: string): boolean {
	const left = Buffer.from(expected);
	const right = Buffer.from(given);
	return left.length === right.length && timingSafeEqual(left, right);
}

function canonicalPath(address: Address): string {
	const key = (address.key ?? '').split('/').map(encodeRfc3986).join('/');
	return `/${encodeRfc3986(address.bucket)}/${key}`;
}

function canonicalQuery(query: Query): string {
	return query
		.filter(([name]) => name !== 'X-Amz-Signature')
		.map(([name, value]) => `${encodeRfc3986(name)}=${encodeRfc3986(value)}`)
		.sort()
		.join('&');
}

const canonicalHeaders = (names: readonly string[], headers: Headers): string =>
	names.map((name) => `${name}:${(headers.get(name) ?? '').trim().replace(/\s+/g, ' ')}\n`).join('');

function dateOf(text: string): Date {
	const match = /^(\d{4})(\d{2})(\d{2})T(\d{2})(\d{2})(\d{2})Z$/.exec(text);
	const date = match ? new Date(`${match[1]}-${match[2]}-${match[3]}T${match[4]}:${match[5]}:${match[6]}Z`) : null;
	if (!date || Number.isNaN(date.getTime())) {
		throw new Problem('AccessDenied', 'The request has no valid date in the form YYYYMMDDTHHMMSSZ.');
	}
	return date;
}

function headerClaim(authorization: string, headers: Headers, now: Date): Claim {
	const match = /^AWS4-HMAC-SHA256\s+Credential=([^,\s]+),\s*SignedHeaders=([^,\s]+),\s*Signature=([0-9a-f]{64})$/.exec(
		authorization
	);
	if (!match) throw new Problem('AuthorizationHeaderMalformed', `Only ${ALGORITHM} is understood.`);
	const [, credential = '', signed = '', signature = ''] = match;
	const payload = headers.get('x-amz-content-sha256');
	if (payload === undefined) throw new Problem('InvalidRequest', 'The header x-amz-content-sha256 is missing.');
	const date = headers.get('x-amz-date') ?? '';
	if (Math.abs(dateOf(date).getTime() - now.getTime()) > SKEW_MS) {
		throw new Problem('RequestTimeTooSkewed', 'The clock of the request and of the bucket differ by over 15 minutes.');
	}
	return { credential, signedHeaders: signed.split(';'), signature, date, payload };
}

function queryClaim(query: Query, headers: Headers, now: Date): Claim {
	const need = (name: string): string => {
		const value = queryValue(query, name);
		if (!value) throw new Problem('AuthorizationQueryParametersError', `The parameter ${name} is missing.`);
		return value;
	};
	if (need('X-Amz-Algorithm') !== ALGORITHM) {
		throw new Problem('AuthorizationQueryParametersError', `Only ${ALGORITHM} is understood.`);
	}
	const expires = need('X-Amz-Expires');
	const seconds = /^\d{1,6}$/.test(expires) ? Number(expires) : 0;
	if (seconds < 1 || seconds > LONGEST_SECONDS) {
		throw new Problem('AuthorizationQueryParametersError', `X-Amz-Expires must lie between 1 and ${LONGEST_SECONDS}.`);
	}
	const date = need('X-Amz-Date');
	const begins = dateOf(date).getTime();
	if (begins - now.getTime() > SKEW_MS) throw new Problem('AccessDenied', 'Request is not yet valid.');
	if (now.getTime() > begins + seconds * 1000) throw new Problem('AccessDenied', 'Request has expired.');
	return {
		credential: need('X-Amz-Credential'),
		signedHeaders: need('X-Amz-SignedHeaders').split(';'),
		signature: need('X-Amz-Signature'),
		date,
		payload: queryValue(query, 'X-Amz-Content-Sha256') ?? headers.get('x-amz-content-sha256') ?? 'UNSIGNED-PAYLOAD'
	};
}

function claimOf(address: Address, headers: Headers, now: Date): Claim {
	const authorization = headers.get('authorization');
	const inQuery = hasQuery(address.query, 'X-Amz-Signature');
	if (authorization !== undefined && inQuery) {
		throw new Problem('InvalidArgument', 'Only one way of signing a request is allowed.');
	}
	if (authorization !== undefined) return headerClaim(authorization, headers, now);
	if (inQuery) return queryClaim(address.query, headers, now);
	throw new Problem('AccessDenied', 'Access Denied: the request is not signed.');
}

function scopeOf(claim: Claim, keys: Keys): string {
	const [accessKeyId, day, region, service, end, ...rest] = claim.credential.split('/');
	if (accessKeyId !== keys.accessKeyId) throw new Problem('InvalidAccessKeyId', 'The access key is not known here.');
	const fits = day === claim.date.slice(0, 8) && region === keys.region && service === 's3' && end === 'aws4_request';
	if (!fits || rest.length > 0) {
		throw new Problem('AuthorizationHeaderMalformed', `The credential's scope must be the day, ${keys.region} and s3.`);
	}
	return `${day}/${region}/${service}/${end}`;
}

/** A header that changes the meaning of a request must be covered by its signature. */
function assertCovered(claim: Claim, headers: Headers): void {
	const signed = new Set(claim.signedHeaders);
	const bare = [...headers.keys()].filter((name) => name.startsWith('x-amz-') && !signed.has(name));
	if (!signed.has('host') || bare.length > 0) {
		throw new Problem(
			'AccessDenied',
			`There were headers present which were not signed: ${bare.join(', ') || 'host'}.`
		);
	}
}

function signingKeyFor(keys: Keys, scope: string): Buffer {
	return scope
		.split('/')
		.reduce<Buffer>(
			(key, part) => createHmac('sha256', key).update(part).digest(),
			Buffer.from(`AWS4${keys.secretAccessKey}`)
		);
}

/** Checks Signature Version 4 in its header or its query form; throws a Problem unless it holds. */
export function verify(method: string, address: Address, headers: Headers, keys: Keys, now: Date): Verified {
	const claim = claimOf(address, headers, now);
	const scope = scopeOf(claim, keys);
	assertCovered(claim, headers);
	const request = [
		method,
		canonicalPath(address),
		canonicalQuery(address.query),
		canonicalHeaders(claim.signedHeaders, headers),
		claim.signedHeaders.join(';'),
		claim.payload
	].join('\n');
	const signingKey = signingKeyFor(keys, scope);
	const expected = hmacHex(signingKey, [ALGORITHM, claim.date, scope, sha256Hex(request)].join('\n'));
	if (!sameSignature(expected, claim.signature)) {
		throw new Problem('SignatureDoesNotMatch', 'The signature does not match the request.');
	}
	return { payload: claim.payload, signature: claim.signature, date: claim.date, scope, signingKey };
}
