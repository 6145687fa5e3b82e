import type { Readable } from 'node:stream';
import type { DocumentDetails, DocumentSubject, SubjectKind } from '$lib/schemas/document';
import type { Page } from '$lib/schemas/paging';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import {
	documentById,
	documentsOf,
	insertDocument,
	insertLink,
	keepFile,
	linksOf,
	listDocuments,
	lockLink,
	requireSubject,
	withdrawLink,
	type DocumentFilter,
	type DocumentRow,
	type FileFacts,
	type LinkRow
} from '../db/documents';
import {
	citationsOf,
	editionsOf,
	namedLinksOf,
	subjectAt,
	type Citation,
	type Edition,
	type NamedLink
} from '../db/document-uses';
import { uploadById } from '../db/uploads';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { sha256 as hashOf } from '../hash';
import { bucket } from '../storage/bucket';
import type { Disposition } from '../storage/disposition';
import { inspectPdf, pdfInMemory } from '../storage/inspect-pdf';
import { contentKey } from '../storage/keys';
import { FILE_KINDS, kindOfMediaType, nameFits, nameForKind } from '../storage/kinds';

/** Long enough to be followed at once, too short to be passed on. */
const DOWNLOAD_SECONDS = 60;

/** What is said of a file beside its name. */
export interface FileRemarks {
	/** Its name promises another kind than its content has; it is kept, and sent back, under the true one. */
	readonly renamed: boolean;
	readonly trueName: string;
	/** Whether it can be bound into a product file: a PDF that opens and restricts nothing. */
	readonly bindable: boolean;
}

export type DocumentView = DocumentRow & FileRemarks;

export function remarksOn(facts: FileFacts, fileName: string): FileRemarks {
	const kind = kindOfMediaType(facts.mediaType);
	return {
		renamed: kind !== null && !nameFits(fileName, kind),
		trueName: kind === null ? fileName : nameForKind(fileName, kind),
		bindable: kind === 'pdf' && facts.pages !== null && !facts.encrypted && !facts.broken
	};
}

const view = <T extends DocumentRow>(row: T): T & FileRemarks => ({ ...row, ...remarksOn(row, row.fileName) });

/** Files a document and attaches it, inside the transaction of the caller. */
export async function fileDocument(
	trx: Trx,
	actor: Actor,
	file: { readonly sha256: string; readonly fileName: string },
	details: DocumentDetails
): Promise<string> {
	const { subjects, ...about } = details;
	if (about.supersedes) await documentById(trx, about.supersedes);
	const id = await insertDocument(trx, { ...about, ...file, personId: actor.personId });
	await audit(trx, actor, {
		stream: { kind: 'workspace', id: WORKSPACE_SUBJECT },
		action: 'document-filed',
		subject: id,
		after: { ...about, ...file }
	});
	// One order for everybody: two people attaching to the same subjects cannot wait for each other.
	const ordered = subjects.toSorted((a, b) => (`${a.kind}${a.id}` < `${b.kind}${b.id}` ? -1 : 1));
	for (const subject of ordered) await attach(trx, actor, id, subject);
	return id;
}

async function attach(trx: Trx, actor: Actor, documentId: string, subject: DocumentSubject): Promise<string> {
	await requireSubject(trx, subject.kind, subject.id);
	const linkId = await insertLink(trx, documentId, subject, actor.personId);
	await audit(trx, actor, {
		stream: { kind: subject.kind, id: subject.id },
		action: 'document-attached',
		subject: documentId,
		after: { linkId, ...subject }
	});
	return linkId;
}

/** Makes a document of a finished upload of one's own. @throws Refused 'wrong-state' while it is not finished. */
export async function createDocument(actor: Actor, uploadId: string, details: DocumentDetails): Promise<string> {
	requireAct(actor, 'attachDocument');
	return withActor(actor, async (trx) => {
		const upload = await uploadById(trx, uploadId);
		if (upload.state !== 'done' || upload.sha256 === null) throw new Refused('wrong-state', { state: upload.state });
		return fileDocument(trx, actor, { sha256: upload.sha256, fileName: upload.name }, details);
	});
}

export async function attachDocument(actor: Actor, documentId: string, subject: DocumentSubject): Promise<string> {
	requireAct(actor, 'attachDocument');
	return withActor(actor, async (trx) => {
		await documentById(trx, documentId);
		return attach(trx, actor, documentId, subject);
	});
}

/** Takes a document off a subject; both stay, and the audit keeps that they belonged together. */
export async function detachDocument(actor: Actor, linkId: string, reason: string | null): Promise<void> {
	requireAct(actor, 'attachDocument');
	return withActor(actor, async (trx) => {
		const link = await lockLink(trx, linkId);
		await withdrawLink(trx, linkId, new Date());
		await audit(trx, actor, {
			stream: { kind: link.subjectKind, id: link.subjectId },
			action: 'document-detached',
			subject: link.documentId,
			before: link,
			reason
		});
	});
}

export function searchDocuments(actor: Actor, query: DocumentFilter): Promise<Page<DocumentView>> {
	return withActor(actor, async (trx) => {
		const page = await listDocuments(trx, query);
		return { ...page, rows: page.rows.map(view) };
	});
}

export function readDocument(
	actor: Actor,
	id: string
): Promise<{ readonly document: DocumentView; readonly links: readonly LinkRow[] }> {
	return withActor(actor, async (trx) => ({
		document: view(await documentById(trx, id)),
		links: await linksOf(trx, id)
	}));
}

export interface DocumentPage {
	readonly document: DocumentView;
	readonly links: readonly NamedLink[];
	readonly citations: readonly Citation[];
	readonly editions: readonly Edition[];
}

/** A document with everything that rests on it. @throws Refused 'not-found'. */
export function readDocumentPage(actor: Actor, id: string): Promise<DocumentPage> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => ({
		document: view(await documentById(trx, id)),
		links: await namedLinksOf(trx, id),
		citations: await citationsOf(trx, id),
		editions: await editionsOf(trx, id)
	}));
}

/**
 * Attaches a document to what a person names by code or slug, one or many; where it is attached already, nothing changes.
 * @throws Refused 'not-found' with the first name that nothing bears, 'exists' when it is attached to all of them.
 */
export function attachByAddress(
	actor: Actor,
	documentId: string,
	kind: SubjectKind,
	addresses: readonly string[]
): Promise<number> {
	requireAct(actor, 'attachDocument');
	return withActor(actor, async (trx) => {
		await documentById(trx, documentId);
		const present = new Set(
			(await namedLinksOf(trx, documentId)).filter((link) => link.kind === kind).map((link) => link.address)
		);
		const wanted = [...new Set(addresses)].filter((address) => !present.has(address)).sort();
		for (const address of wanted) await attach(trx, actor, documentId, await subjectAt(trx, kind, address));
		if (wanted.length === 0) throw new Refused('exists', { field: 'address', value: addresses.join(', ') });
		return wanted.length;
	});
}

export interface Preview {
	readonly body: Readable;
	readonly mediaType: string;
	readonly bytes: number;
}

/** The content of a file of a kind that a page may show. @throws Refused 'not-found' for any other, or an encrypted one. */
export async function previewOf(actor: Actor, id: string): Promise<Preview> {
	requireAct(actor, 'readLaboratory');
	const document = await withActor(actor, (trx) => documentById(trx, id));
	const kind = kindOfMediaType(document.mediaType);
	if (kind === null || !FILE_KINDS[kind].inline || document.encrypted) throw new Refused('not-found');
	const content = await bucket().get(contentKey(document.sha256));
	if (!content) throw new Refused('not-found');
	return { body: content.body, mediaType: document.mediaType, bytes: content.bytes };
}

export interface MadeFile {
	readonly bytes: Uint8Array;
	readonly mediaType: string;
	readonly fileName: string;
}

/**
 * Keeps content that the program itself made under its hash, and answers what `fileDocument` needs to file it.
 * The object is there before the row: a row without content is never seen.
 */
export async function storeBytes(
	trx: Trx,
	actor: Actor,
	{ bytes, mediaType, fileName }: MadeFile
): Promise<{ readonly sha256: string; readonly fileName: string }> {
	if (bytes.length === 0) throw new Refused('file-empty', { name: fileName });
	const sha256 = hashOf(bytes);
	const place = contentKey(sha256);
	if ((await bucket().head(place))?.bytes !== bytes.length) await bucket().put(place, bytes, mediaType);
	const pdf =
		kindOfMediaType(mediaType) === 'pdf'
			? await inspectPdf(pdfInMemory(bytes))
			: { pages: null, encrypted: false, broken: false };
	await keepFile(trx, { sha256, bytes: bytes.length, mediaType, ...pdf }, actor.personId);
	return { sha256, fileName };
}

export function attachedDocuments(actor: Actor, kind: SubjectKind, id: string) {
	return withActor(actor, async (trx) => (await documentsOf(trx, kind, id)).map(view));
}

/** A short-lived address of the file, for an actor who may see the document. @throws Refused 'not-found'. */
export async function downloadAddress(actor: Actor, id: string, disposition: Disposition): Promise<string> {
	const document = await withActor(actor, (trx) => documentById(trx, id));
	const { trueName } = remarksOn(document, document.fileName);
	const { mediaType, sha256 } = document;
	return bucket().signedDownload(sha256, { fileName: trueName, mediaType, disposition, seconds: DOWNLOAD_SECONDS });
}

/** Enough time to ask a supplier for the next edition. */
const EXPIRING_DAYS = 90;
const DAY_MS = 24 * 60 * 60 * 1000;

/** The day up to which a document counts as running out soon. */
export const expiringBy = (): string => new Date(Date.now() + EXPIRING_DAYS * DAY_MS).toISOString().slice(0, 10);
