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
/** A document can be written so that finding its pages takes hours; honest ones take well under a second. */
const PATIENCE_MS = 20_000;

/** The document's own fault, and ours for its sake: it was taking too long. */
class TooSlow extends Error {
	override readonly name = 'TooSlow';
}
const FAULTS_OF_DOCUMENT = [
	'InvalidPDFException',
	'FormatError',
	'UnknownErrorException',
	'XRefParseException',
	'TooSlow'
];

type Library = typeof Pdfjs;

/** Hands pdf.js the pieces it asks for, so that a file of 250 MiB is never held whole. */
function transportOver(library: Library, source: PdfSource, onFault: (error: unknown) => void) {
	class Transport extends library.PDFDataRangeTransport {
		#over = false;

		override requestDataRange(begin: number, end: number): void {
			// Through the event loop: a chain of promises alone would never let the timer of `patience` strike.
			setImmediate(() => {
				if (!this.#over)
					source.read(begin, Math.min(end, source.bytes)).then((piece) => this.#hand(begin, piece), onFault);
			});
		}

		#hand(begin: number, piece: Uint8Array): void {
			if (!this.#over) this.onDataRange(begin, piece);
		}

		override abort(): void {
			this.#over = true;
		}
	}
	return new Transport(source.bytes, null);
}

const nameOf = (error: unknown): string => (error instanceof Error ? error.name : '');

/**
 * Counts the pages of a PDF and says whether it is encrypted or cannot be read. A fault of reading the source is
 * thrown; a fault of the document is an answer, and so is one that takes longer than `patience` (milliseconds).
 */
export async function inspectPdf(source: PdfSource, patience = PATIENCE_MS): Promise<PdfFacts> {
	const library = await import('pdfjs-dist/legacy/build/pdf.mjs');
	let giveUp: (error: unknown) => void = () => undefined;
	const givenUp = new Promise<never>((_resolve, reject) => (giveUp = reject));
	const timer = setTimeout(() => giveUp(new TooSlow()), patience);
	const task = library.getDocument({
		range: transportOver(library, source, giveUp),
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
		return await Promise.race([factsOf(task), givenUp]);
	} catch (error) {
		if (nameOf(error) === 'PasswordException') return { pages: null, encrypted: true, broken: false };
		if (FAULTS_OF_DOCUMENT.includes(nameOf(error))) return { pages: null, encrypted: false, broken: true };
		throw error;
	} finally {
		clearTimeout(timer);
		await task.destroy();
	}
}

async function factsOf(task: Pdfjs.PDFDocumentLoadingTask): Promise<PdfFacts> {
	const document = await task.promise;
	const permissions = await document.getPermissions();
	return { pages: document.numPages, encrypted: permissions !== null, broken: false };
}

export const pdfInMemory = (content: Uint8Array): PdfSource => ({
	bytes: content.length,
	// A copy: pdf.js takes the piece over and empties it.
	read: async (start, end) => content.slice(start, end)
});
