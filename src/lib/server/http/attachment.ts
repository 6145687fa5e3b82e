import { contentDisposition } from '../storage/disposition';

export interface Attachment {
	readonly fileName: string;
	readonly mediaType: string;
	readonly body: Uint8Array<ArrayBuffer>;
}

/** A made file as an answer: always saved, never shown in our own origin, never kept by a cache. */
export const attachment = ({ fileName, mediaType, body }: Attachment) =>
	new Response(body, {
		headers: {
			'content-type': mediaType,
			'content-length': String(body.byteLength),
			'content-disposition': contentDisposition('attachment', fileName),
			'cache-control': 'private, no-store'
		}
	});
