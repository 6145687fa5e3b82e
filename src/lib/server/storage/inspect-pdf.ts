import type * as Pdfjs from 'pdfjs-dist/legacy/build/pdf.mjs';

/** Content that can be read in pieces; `end` is exclusive. */
export interface PdfSource {
	readonly bytes: number;
	read(start: number, end: number): Promise<Uint8Array>;
}

/** `encrypted` covers a document that opens without a password but restricts its use: neither can be bound. */
export interface PdfFacts {
	readonly pages: number | null;
	readonly encrypted: boolean;
	readonly broken: boolean;
}

const PIECE_BYTES = 256 * 1024;
const LOUD_AS_NEVER = 0;

type Library = typeof Pdfjs;

/** Hands pdf.js the pieces it asks for, so that a file of 250 MiB is never held whole. */
function transportOver(library: Library, source: PdfSource, onFault: (error: unknown) => void) {
	class Transport extends library.PDFDataRangeTransport {
		override requestDataRange(begin: number, end: number): void {
			source.read(begin, Math.min(end, source.bytes)).then(
				(piece) => this.onDataRange(begin, piece),
				(error: unknown) => onFault(error)
			);
		}
	}
	return new Transport(source.bytes, null);
}

const nameOf = (error: unknown): string => (error instanceof Error ? error.name : '');

/**
 * Counts the pages of a PDF and says whether it is encrypted or cannot be read. A fault of reading the source is
 * thrown; a fault of the document is an answer.
 */
export async function inspectPdf(source: PdfSource): Promise<PdfFacts> {
	const library = await import('pdfjs-dist/legacy/build/pdf.mjs');
	let failReading: (error: unknown) => void = () => undefined;
	const reading = new Promise<never>((_resolve, reject) => (failReading = reject));
	const task = library.getDocument({
		range: transportOver(library, source, failReading),
		length: source.bytes,
		rangeChunkSize: PIECE_BYTES,
		disableAutoFetch: true,
		disableStream: true,
		isEvalSupported: false,
		useSystemFonts: false,
		stopAtErrors: true,
		verbosity: LOUD_AS_NEVER
	});
	try {
		const document = await Promise.race([task.promise, reading]);
		const permissions = await Promise.race([document.getPermissions(), reading]);
		return { pages: document.numPages, encrypted: permissions !== null, broken: false };
	} catch (error) {
		if (nameOf(error) === 'PasswordException') return { pages: null, encrypted: true, broken: false };
		const ofDocument = ['InvalidPDFException', 'FormatError', 'UnknownErrorException', 'XRefParseException'];
		if (ofDocument.includes(nameOf(error))) return { pages: null, encrypted: false, broken: true };
		throw error;
	} finally {
		await task.destroy();
	}
}

export const pdfInMemory = (content: Uint8Array): PdfSource => ({
	bytes: content.length,
	// A copy: pdf.js takes the piece over and empties it.
	read: async (start, end) => content.slice(start, end)
});
