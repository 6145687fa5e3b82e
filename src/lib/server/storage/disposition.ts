import { cleanFileName } from './upload-rules';

export type Disposition = 'inline' | 'attachment';

/** RFC 8187's attr-char is smaller than what encodeURIComponent leaves alone. */
const encodeExtended = (text: string): string =>
	encodeURIComponent(text).replace(/['()*]/g, (char) => `%${char.charCodeAt(0).toString(16).toUpperCase()}`);

const asciiOf = (text: string): string =>
	text
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.replace(/[^A-Za-z0-9 ._()+,=@~-]/g, '_');

/**
 * A Content-Disposition for any name: the plain form for old readers, the extended one (RFC 6266, RFC 8187)
 * for the name as it is. No character of the name can leave its quotation marks or add a header.
 */
export function contentDisposition(disposition: Disposition, fileName: string): string {
	const name = cleanFileName(fileName);
	return `${disposition}; filename="${asciiOf(name)}"; filename*=UTF-8''${encodeExtended(name)}`;
}
