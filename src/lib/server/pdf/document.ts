import pdfmake from 'pdfmake';
import type { TDocumentDefinitions } from 'pdfmake/interfaces';
import { dress } from './dress';
import { openShelf } from './fonts';

export interface PdfDetails {
	/** Printed into the file and part of its identity: the same instant and data give the same bytes. */
	readonly creationDate: Date;
	readonly title: string;
	readonly author: string;
	readonly subject: string;
	readonly language?: string;
	readonly fontFolder?: string;
	/** Share of the pages written so far, 0 to 1. The layout before it is one step that cannot be watched. */
	readonly onWritten?: (share: number) => void;
}

/**
 * Lays a definition out and returns the file. pdfmake changes the definition that it is given, so it receives a copy
 * from `dress`; the caller's stays as it was. Layout holds the event loop for its whole time: call it in a child
 * process for anything longer than a page or two.
 */
export async function renderPdf(definition: TDocumentDefinitions, details: PdfDetails): Promise<Uint8Array> {
	const shelf = openShelf(details.fontFolder);
	pdfmake.setProgressCallback(details.onWritten ?? (() => undefined));
	const pdf = pdfmake.createPdf({
		...dress(definition, shelf),
		version: '1.7',
		language: details.language ?? 'en-GB',
		displayTitle: true,
		info: {
			title: details.title,
			author: details.author,
			subject: details.subject,
			creator: 'Costmary',
			producer: 'Costmary',
			creationDate: details.creationDate,
			modDate: details.creationDate
		}
	});
	return new Uint8Array(await pdf.getBuffer());
}
