import { Problem } from './problem';

export type Query = readonly (readonly [name: string, value: string])[];

/** Where a request points: the bucket, the key (null for the bucket itself) and the decoded query. */
export interface Address {
	readonly bucket: string;
	readonly key: string | null;
	readonly query: Query;
}

const KEY_LIMIT_BYTES = 1024;

const decode = (text: string): string => {
	try {
		return decodeURIComponent(text);
	} catch {
		throw new Problem('InvalidURI', 'The address is not well-formed percent-encoded UTF-8.');
	}
};

function parseQuery(text: string): Query {
	if (text === '') return [];
	return text.split('&').map((pair) => {
		const equals = pair.indexOf('=');
		return equals < 0 ? [decode(pair), ''] : [decode(pair.slice(0, equals)), decode(pair.slice(equals + 1))];
	});
}

/**
 * Reads the raw request target. `new URL` is avoided on purpose: it folds `..`, so a key such as `../../x`
 * would point elsewhere than the address that was signed.
 */
export function parseAddress(target: string): Address {
	if (!target.startsWith('/')) throw new Problem('InvalidURI', 'The address must begin with a slash.');
	const mark = target.indexOf('?');
	const path = mark < 0 ? target : target.slice(0, mark);
	const slash = path.indexOf('/', 1);
	const bucket = decode(slash < 0 ? path.slice(1) : path.slice(1, slash));
	const key = slash < 0 ? '' : decode(path.slice(slash + 1));
	if (Buffer.byteLength(key) > KEY_LIMIT_BYTES) {
		throw new Problem('KeyTooLongError', `The key is longer than ${KEY_LIMIT_BYTES} bytes.`);
	}
	return { bucket, key: key === '' ? null : key, query: mark < 0 ? [] : parseQuery(target.slice(mark + 1)) };
}

export const queryValue = (query: Query, name: string): string | undefined => query.find(([key]) => key === name)?.[1];

export const hasQuery = (query: Query, name: string): boolean => query.some(([key]) => key === name);
