import type { Readable } from 'node:stream';
import { readCsv } from './csv';
import { SHEET_LIMIT_BYTES, UnreadableSheet, type SheetRow } from './types';
import { readWorkbook } from './workbook';

export * from './types';

const WORKBOOK = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
const TEXTS = new Set(['text/csv', 'text/plain']);

async function whole(body: Readable): Promise<Buffer> {
	const pieces: Buffer[] = [];
	let bytes = 0;
	for await (const chunk of body) {
		bytes += (chunk as Buffer).length;
		if (bytes > SHEET_LIMIT_BYTES) throw new UnreadableSheet({ kind: 'tooLarge', limit: SHEET_LIMIT_BYTES });
		pieces.push(chunk as Buffer);
	}
	return Buffer.concat(pieces);
}

/** The rows of a stored sheet, by the media type that its content was recognised as. @throws UnreadableSheet. */
export async function readSheet(body: Readable, mediaType: string): Promise<readonly SheetRow[]> {
	if (mediaType === WORKBOOK) return readWorkbook(await whole(body));
	if (TEXTS.has(mediaType)) return readCsv(await whole(body));
	body.destroy();
	throw new UnreadableSheet({ kind: 'notASheet' });
}
