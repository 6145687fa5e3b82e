import { parseAddress } from './address';
import { aboutOf, onlyNew, sendEmpty, sendXml, type Call } from './call';
import { checksumHeader, checksumOfHeader } from './checksums';
import { Problem } from './problem';
import type { StoredObject } from './store';
import { childrenOf, childText, parseXml } from './xml';

const DOCUMENT_LIMIT = 1024 * 1024;
const MOST_KEYS = 1000;

const checksumHeaders = (object: { readonly checksums: Readonly<Record<string, string>> }): Record<string, string> =>
	Object.fromEntries(
		Object.entries(object.checksums).flatMap(([name, value]) => {
			const known = checksumOfHeader(`x-amz-checksum-${name}`);
			return known ? [[checksumHeader(known), value]] : [];
		})
	);

export async function putObject(call: Call): Promise<void> {
	const condition = onlyNew(call.headers);
	call.body.assertLength();
	const received = await call.store.receive(call.body);
	const about = aboutOf(call.headers, call.body.checksums);
	const object = await call.store.commit(received, call.key, about, { onlyNew: condition });
	sendEmpty(call.response, 200, { etag: `"${object.etag}"`, ...checksumHeaders(object) });
}

function copySource(call: Call): StoredObject {
	const header = call.headers.get('x-amz-copy-source') ?? '';
	const source = parseAddress(header.startsWith('/') ? header : `/${header}`);
	if (source.query.length > 0) throw new Problem('NotImplemented', 'Versions are not kept.');
	if (source.bucket !== call.bucket) throw new Problem('NoSuchBucket', 'The bucket of the source does not exist.');
	return call.store.find(source.key ?? '');
}

export async function copyObject(call: Call): Promise<void> {
	const directive = call.headers.get('x-amz-metadata-directive') ?? 'COPY';
	if (directive !== 'COPY' && directive !== 'REPLACE')
		throw new Problem('InvalidArgument', 'Unknown metadata directive.');
	const source = copySource(call);
	if (source.key === call.key && directive === 'COPY') {
		throw new Problem('InvalidRequest', 'An object can be copied onto itself only with new metadata.');
	}
	const condition = onlyNew(call.headers);
	const received = await call.store.receive(await call.store.read(source));
	const about = directive === 'COPY' ? source : aboutOf(call.headers, source.checksums);
	const { headers, meta, checksums } = about;
	const object = await call.store.commit(received, call.key, { headers, meta, checksums }, { onlyNew: condition });
	sendXml(call.response, [
		'CopyObjectResult',
		[
			['LastModified', object.modified],
			['ETag', `"${object.etag}"`]
		]
	]);
}

export async function deleteObject(call: Call): Promise<void> {
	await call.store.remove(call.key);
	sendEmpty(call.response, 204);
}

export async function deleteObjects(call: Call): Promise<void> {
	const request = parseXml(await call.body.text(DOCUMENT_LIMIT));
	const keys = childrenOf(request, 'Object').map((object) => childText(object, 'Key') ?? '');
	if (request.name !== 'Delete' || keys.length === 0 || keys.length > MOST_KEYS || keys.includes('')) {
		throw new Problem('MalformedXML', `The request must name 1 to ${MOST_KEYS} keys.`);
	}
	for (const key of keys) await call.store.remove(key);
	const quiet = childText(request, 'Quiet') === 'true';
	sendXml(call.response, ['DeleteResult', quiet ? [] : keys.map((key) => ['Deleted', [['Key', key]]] as const)]);
}

export { checksumHeaders, DOCUMENT_LIMIT };
