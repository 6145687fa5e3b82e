import { sql } from 'kysely';
import type { DocumentSubject, SubjectKind } from '$lib/schemas/document';
import { Refused } from '../refused';
import type { Trx } from './with-actor';

/** What a document is attached to, named as people name it. `address` is the code or the slug. */
export interface NamedLink {
	readonly linkId: string;
	readonly kind: SubjectKind;
	readonly name: string;
	readonly address: string;
	readonly need: string | null;
}

export const namedLinksOf = async (trx: Trx, documentId: string): Promise<readonly NamedLink[]> =>
	(
		await sql<NamedLink>`
			select l.id as "linkId", l.subject_kind as kind, l.need,
				coalesce(m.trade_name, f.name, p.name) as name, coalesce(m.code, f.code, p.slug) as address
			from document_link l
			left join material m on l.subject_kind = 'material' and m.id = l.subject_id
			left join formula f on l.subject_kind = 'formula' and f.id = l.subject_id
			left join product p on l.subject_kind = 'product' and p.id = l.subject_id
			where l.document_id = ${documentId} and l.withdrawn_at is null
				and coalesce(m.id, f.id, p.id) is not null
			order by kind, name`.execute(trx)
	).rows;

/** A figure of a material that rests on the document. */
export interface Citation {
	readonly constituentId: string;
	readonly code: string;
	readonly tradeName: string;
	readonly number: number;
	readonly inci: string;
	readonly page: number | null;
}

const MOST_CITATIONS = 500;

export const citationsOf = (trx: Trx, documentId: string): Promise<readonly Citation[]> =>
	trx
		.selectFrom('constituent')
		.innerJoin('substance', 'substance.id', 'constituent.substance_id')
		.innerJoin('material_version', 'material_version.id', 'constituent.material_version_id')
		.innerJoin('material', 'material.id', 'material_version.material_id')
		.select([
			'constituent.id as constituentId',
			'material.code',
			'material.trade_name as tradeName',
			'material_version.number',
			'substance.inci',
			'constituent.source_page as page'
		])
		.where('constituent.source_document_id', '=', documentId)
		.orderBy('material.code')
		.orderBy('material_version.number', 'desc')
		.orderBy('constituent.position')
		.limit(MOST_CITATIONS)
		.execute();

export interface Edition {
	readonly id: string;
	readonly title: string;
	readonly dated: string | null;
	readonly createdAt: Date;
}

/** A document with what it replaces and what replaces it, the newest first. */
export const editionsOf = async (trx: Trx, documentId: string): Promise<readonly Edition[]> =>
	(
		await sql<Edition>`
			with recursive older as (
				select id, supersedes_id from document where id = ${documentId}
				union select d.id, d.supersedes_id from document d join older o on d.id = o.supersedes_id
			), newer as (
				select id from document where id = ${documentId}
				union select d.id from document d join newer n on d.supersedes_id = n.id
			)
			select id, title, dated, created_at as "createdAt" from document
			where id in (select id from older union select id from newer)
			order by created_at desc, id desc`.execute(trx)
	).rows;

/** A material or formula by its code, a product by its slug. @throws Refused 'not-found'. */
export async function subjectAt(trx: Trx, kind: SubjectKind, address: string): Promise<DocumentSubject> {
	const column = kind === 'product' ? 'slug' : 'code';
	const { rows } = await sql<{ id: string }>`
		select id from ${sql.table(kind)} where ${sql.ref(column)} = ${address}`.execute(trx);
	const [found] = rows;
	if (!found) throw new Refused('not-found', { field: 'address', value: address });
	return { kind, id: found.id };
}
