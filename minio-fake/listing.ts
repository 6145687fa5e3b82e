import { queryValue, type Query } from './address';
import { sendXml, type Call } from './call';
import { Problem } from './problem';
import { encodeRfc3986 } from './sigv4';
import type { StoredObject } from './store';
import type { Element } from './xml';

const MOST_KEYS = 1000;

interface Wanted {
	readonly prefix: string;
	readonly delimiter: string;
	readonly most: number;
	/** Everything up to and including this name was listed before. */
	readonly after: string;
	readonly afterGroup: boolean;
}

type Entry =
	| { readonly kind: 'object'; readonly name: string; readonly object: StoredObject }
	| { readonly kind: 'group'; readonly name: string };

const tokenOf = (entry: Entry): string => Buffer.from(JSON.stringify([entry.kind, entry.name])).toString('base64url');

function readToken(token: string): { after: string; afterGroup: boolean } {
	try {
		const [kind, name] = JSON.parse(Buffer.from(token, 'base64url').toString('utf8')) as [string, string];
		if (typeof name === 'string') return { after: name, afterGroup: kind === 'group' };
	} catch {
		// Falls through to the one refusal below.
	}
	throw new Problem('InvalidArgument', 'The continuation token was not given out here.');
}

function wantedOf(query: Query): Wanted {
	const maxKeys = queryValue(query, 'max-keys') ?? String(MOST_KEYS);
	if (!/^\d{1,9}$/.test(maxKeys)) throw new Problem('InvalidArgument', 'max-keys is not a number.');
	const token = queryValue(query, 'continuation-token');
	const start = { after: queryValue(query, 'start-after') ?? '', afterGroup: false };
	return {
		prefix: queryValue(query, 'prefix') ?? '',
		delimiter: queryValue(query, 'delimiter') ?? '',
		most: Math.min(Number(maxKeys), MOST_KEYS),
		...(token === undefined ? start : readToken(token))
	};
}

const isAfter = (key: string, { after, afterGroup }: Wanted): boolean =>
	Buffer.compare(Buffer.from(key), Buffer.from(after)) > 0 && !(afterGroup && key.startsWith(after));

/** The page of entries that the request asks for and whether more would follow. */
function page(objects: readonly StoredObject[], wanted: Wanted): { entries: readonly Entry[]; more: boolean } {
	const entries: Entry[] = [];
	for (const object of objects) {
		if (!object.key.startsWith(wanted.prefix) || !isAfter(object.key, wanted)) continue;
		const cut = wanted.delimiter === '' ? -1 : object.key.indexOf(wanted.delimiter, wanted.prefix.length);
		const group = cut < 0 ? null : object.key.slice(0, cut + wanted.delimiter.length);
		const last = entries.at(-1);
		if (group !== null && last?.kind === 'group' && last.name === group) continue;
		if (entries.length === wanted.most) return { entries, more: wanted.most > 0 };
		entries.push(group === null ? { kind: 'object', name: object.key, object } : { kind: 'group', name: group });
	}
	return { entries, more: false };
}

export async function listObjects(call: Call): Promise<void> {
	const { query } = call.address;
	const wanted = wantedOf(query);
	const { entries, more } = page(call.store.list(), wanted);
	const encoding = queryValue(query, 'encoding-type');
	const name = (text: string): string => (encoding === 'url' ? encodeRfc3986(text).replaceAll('%2F', '/') : text);
	const last = entries.at(-1);
	const written = entries.map((entry): Element => {
		if (entry.kind === 'group') return ['CommonPrefixes', [['Prefix', name(entry.name)]]];
		const { object } = entry;
		const fields: Element[] = [
			['Key', name(object.key)],
			['LastModified', object.modified],
			['ETag', `"${object.etag}"`],
			['Size', object.bytes],
			['StorageClass', 'STANDARD']
		];
		return ['Contents', fields];
	});
	sendXml(call.response, [
		'ListBucketResult',
		[
			['Name', call.bucket],
			['Prefix', name(wanted.prefix)],
			wanted.delimiter === '' ? undefined : ['Delimiter', name(wanted.delimiter)],
			encoding === undefined ? undefined : ['EncodingType', encoding],
			['MaxKeys', wanted.most],
			['KeyCount', entries.length],
			['IsTruncated', more],
			more && last ? ['NextContinuationToken', tokenOf(last)] : undefined,
			...written
		]
	]);
}
