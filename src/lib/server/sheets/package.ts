import type { Readable } from 'node:stream';
import { SaxesParser } from 'saxes';
import yauzl from 'yauzl';
import { UnreadableSheet } from './types';

/** What all parts of a workbook that are read may unpack to together, in bytes (100 MiB): a small file can hold far more. */
const UNPACKED_LIMIT = 100 * 1024 * 1024;
const MOST_ENTRIES = 2_000;
/** Compound files: a workbook with a password, or one of the old binary kind. */
const COMPOUND_MAGIC = Buffer.from('d0cf11e0a1b11ae1', 'hex');

export type Attributes = Readonly<Record<string, string>>;

/** What is heard while a part is read. Names come without their prefix. */
export interface PartListener {
	readonly open?: (name: string, attributes: Attributes) => void;
	readonly text?: (text: string) => void;
	readonly close?: (name: string) => void;
}

const localName = (name: string) => name.slice(name.indexOf(':') + 1);

/** The parts of an Office package; unpacked one at a time, as a stream, within one limit for all. */
export class OfficePackage {
	readonly #zip: yauzl.ZipFile;
	readonly #entries: ReadonlyMap<string, yauzl.Entry>;
	#unpacked = 0;

	private constructor(zip: yauzl.ZipFile, entries: ReadonlyMap<string, yauzl.Entry>) {
		this.#zip = zip;
		this.#entries = entries;
	}

	/** @throws UnreadableSheet for what is no such package, is encrypted, or has more parts than any workbook. */
	static async open(bytes: Buffer): Promise<OfficePackage> {
		if (bytes.subarray(0, COMPOUND_MAGIC.length).equals(COMPOUND_MAGIC)) {
			throw new UnreadableSheet({ kind: 'encrypted' });
		}
		try {
			const zip = await yauzl.fromBufferPromise(bytes, { lazyEntries: true, autoClose: false });
			const entries = new Map<string, yauzl.Entry>();
			for await (const entry of zip.eachEntry()) {
				if (entries.size >= MOST_ENTRIES) throw new UnreadableSheet({ kind: 'notASheet' });
				entries.set(entry.fileName, entry);
			}
			return new OfficePackage(zip, entries);
		} catch (error) {
			if (error instanceof UnreadableSheet) throw error;
			throw new UnreadableSheet({ kind: 'notASheet' });
		}
	}

	has(name: string): boolean {
		return this.#entries.has(name);
	}

	/** Reads a part from beginning to end; does nothing where there is none. @throws UnreadableSheet. */
	async read(name: string, listener: PartListener): Promise<void> {
		const entry = this.#entries.get(name);
		if (!entry) return;
		if (entry.isEncrypted()) throw new UnreadableSheet({ kind: 'encrypted' });
		// The size that the archive announces is held to while it unpacks.
		this.#unpacked += entry.uncompressedSize;
		if (this.#unpacked > UNPACKED_LIMIT) {
			throw new UnreadableSheet({ kind: 'unpacksTooLarge', limit: UNPACKED_LIMIT });
		}
		try {
			await this.#parse(await this.#zip.openReadStreamPromise(entry), listener);
		} catch (error) {
			if (error instanceof UnreadableSheet) throw error;
			throw new UnreadableSheet({ kind: 'notASheet' });
		}
	}

	async #parse(stream: Readable, listener: PartListener): Promise<void> {
		const parser = new SaxesParser();
		const { open, text, close } = listener;
		parser.on('error', (error) => {
			throw error;
		});
		if (open) parser.on('opentag', (tag) => open(localName(tag.name), tag.attributes));
		if (text) parser.on('text', text);
		if (close) parser.on('closetag', (tag) => close(localName(tag.name)));
		const decoder = new TextDecoder();
		for await (const chunk of stream) {
			parser.write(decoder.decode(chunk as Buffer, { stream: true }));
		}
		parser.write(decoder.decode()).close();
	}

	close(): void {
		this.#zip.close();
	}
}
