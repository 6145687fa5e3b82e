import { sql } from 'kysely';
import type { DocumentDetails, DocumentSubject, SubjectKind } from '$lib/schemas/document';
import { PAGE_SIZE, type ListQuery, type Page } from '$lib/schemas/paging';
import { Refused } from '../refused';
import { newId } from './id';
import type { Trx } from './with-actor';

/** A file as the bucket holds it, by its content. */
export interface FileFacts {
	readonly sha256: string;
	readonly bytes: number;
	readonly mediaType: string;
	readonly pages: number | null;
	readonly encrypted: boolean;
	readonly broken: boolean;
}

export interface DocumentRow extends FileFacts {
	readonly id: string;
	readonly clientId: string | null;
	readonly kind: string;
	readonly title: string;
	readonly fileName: string;
	readonly dated: string | null;
	readonly expires: string | null;
	readonly supersedesId: string | null;
	readonly createdAt: Date;
	readonly createdByName: string;
}

export interface LinkRow {
	readonly id: string;
	readonly documentId: string;
	readonly subjectKind: SubjectKind;
	readonly subjectId: string;
	readonly need: string | null;
	readonly formulaVersionId: string | null;
}

/** The same content is kept once; a second sending of it changes nothing and answers what is known of the first. */
export async function keepFile(trx: Trx, facts: FileFacts, personId: string): Promise<FileFacts> {
	await trx
		.insertInto('file_object')
		.values({
			sha256: facts.sha256,
			bytes: facts.bytes,
			media_type: facts.mediaType,
			pages: facts.pages,
			encrypted: facts.encrypted,
			broken: facts.broken,
			created_by: personId
		})
		.onConflict((conflict) => conflict.column('sha256').doNothing())
		.execute();
	return fileFacts(trx, facts.sha256);
}

export async function fileFacts(trx: Trx, sha256: string): Promise<FileFacts> {
	const row = await trx
		.selectFrom('file_object')
		.select(['sha256', 'bytes', 'media_type as mediaType', 'pages', 'encrypted', 'broken'])
		.where('sha256', '=', sha256)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return { ...row, bytes: Number(row.bytes) };
}

export interface NewDocument extends Omit<DocumentDetails, 'subjects'> {
	readonly fileName: string;
	readonly sha256: string;
	readonly personId: string;
}

export async function insertDocument(trx: Trx, document: NewDocument): Promise<string> {
	const id = newId<'document'>();
	await trx
		.insertInto('document')
		.values({
			id,
			kind: document.kind,
			title: document.title,
			file_name: document.fileName,
			sha256: document.sha256,
			dated: document.dated,
			expires: document.expires,
			supersedes_id: document.supersedes ?? null,
			created_by: document.personId
		})
		.execute();
	return id;
}

export async function insertLink(
	trx: Trx,
	documentId: string,
	subject: DocumentSubject,
	personId: string
): Promise<string> {
	const id = newId<'documentLink'>();
	await trx
		.insertInto('document_link')
		.values({
			id,
			document_id: documentId,
			subject_kind: subject.kind,
			subject_id: subject.id,
			need: subject.need ?? null,
			formula_version_id: subject.formulaVersionId ?? null,
			created_by: personId
		})
		.execute();
	return id;
}

/** @throws Refused 'not-found' when this actor sees no such material, product or formula. */
export async function requireSubject(trx: Trx, kind: SubjectKind, id: string): Promise<void> {
	const row = await trx.selectFrom(kind).select('id').where('id', '=', id).executeTakeFirst();
	if (!row) throw new Refused('not-found');
}

const documentRows = (trx: Trx) =>
	trx
		.selectFrom('document')
		.innerJoin('file_object', 'file_object.sha256', 'document.sha256')
		.leftJoin('person', 'person.id', 'document.created_by')
		.select([
			'document.id',
			'document.client_id as clientId',
			'document.kind',
			'document.title',
			'document.file_name as fileName',
			'document.dated',
			'document.expires',
			'document.supersedes_id as supersedesId',
			'document.created_at as createdAt',
			sql<string>`coalesce(person.name, '')`.as('createdByName'),
			'document.sha256',
			'file_object.bytes',
			'file_object.media_type as mediaType',
			'file_object.pages',
			'file_object.encrypted',
			'file_object.broken'
		]);

const withBytes = <T extends { bytes: string }>(row: T) => ({ ...row, bytes: Number(row.bytes) });

/** @throws Refused 'not-found', also for a document that this actor may not see. */
export async function documentById(trx: Trx, id: string): Promise<DocumentRow> {
	const row = await documentRows(trx).where('document.id', '=', id).executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return withBytes(row);
}

export interface DocumentFilter extends ListQuery {
	readonly kind?: string;
	/** Only what expires on or before this day. */
	readonly expiresBy?: string | null;
}

const SORTS = { title: 'document.title', kind: 'document.kind', expires: 'document.expires' } as const;
const isSort = (name: string): name is keyof typeof SORTS => Object.hasOwn(SORTS, name);

/** A page of documents whose title or file name holds what is looked for, of one kind or all. */
export async function listDocuments(trx: Trx, query: DocumentFilter): Promise<Page<DocumentRow>> {
	const pattern = `%${query.q.replace(/[\\%_]/g, '\\$&')}%`;
	const { kind, expiresBy } = query;
	const found = documentRows(trx)
		.where((is) => is.or([is('document.title', 'ilike', pattern), is('document.file_name', 'ilike', pattern)]))
		.$if(!!kind, (rows) => rows.where('document.kind', '=', kind ?? ''))
		.$if(!!expiresBy, (rows) => rows.where('document.expires', '<=', expiresBy ?? null));
	const rows = await found
		.orderBy(isSort(query.sort) ? SORTS[query.sort] : 'document.title', query.dir)
		.orderBy('document.id')
		.limit(PAGE_SIZE)
		.offset((query.page - 1) * PAGE_SIZE)
		.execute();
	const { total } = await found
		.clearSelect()
		.select((make) => make.fn.countAll<string>().as('total'))
		.executeTakeFirstOrThrow();
	return { rows: rows.map(withBytes), total: Number(total), page: query.page, pageSize: PAGE_SIZE };
}

/** What is attached to one subject and not withdrawn; the newest first. */
export async function documentsOf(
	trx: Trx,
	kind: SubjectKind,
	id: string
): Promise<readonly (DocumentRow & { readonly linkId: string; readonly need: string | null })[]> {
	const rows = await documentRows(trx)
		.innerJoin('document_link', 'document_link.document_id', 'document.id')
		.select(['document_link.id as linkId', 'document_link.need'])
		.where('document_link.subject_kind', '=', kind)
		.where('document_link.subject_id', '=', id)
		.where('document_link.withdrawn_at', 'is', null)
		.orderBy('document.created_at', 'desc')
		.orderBy('document.id')
		.execute();
	return rows.map(withBytes);
}

const linkRows = (trx: Trx) =>
	trx
		.selectFrom('document_link')
		.select([
			'id',
			'document_id as documentId',
			'subject_kind as subjectKind',
			'subject_id as subjectId',
			'need',
			'formula_version_id as formulaVersionId'
		])
		.where('withdrawn_at', 'is', null);

export const linksOf = (trx: Trx, documentId: string): Promise<readonly LinkRow[]> =>
	linkRows(trx).where('document_id', '=', documentId).orderBy('created_at').orderBy('id').execute();

/** @throws Refused 'not-found' for a link that is not there or was withdrawn. */
export async function lockLink(trx: Trx, id: string): Promise<LinkRow> {
	const row = await linkRows(trx).where('id', '=', id).forUpdate().executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

export async function withdrawLink(trx: Trx, id: string, at: Date): Promise<void> {
	await trx.updateTable('document_link').set({ withdrawn_at: at }).where('id', '=', id).execute();
}
