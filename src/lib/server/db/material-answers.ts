import { sql } from 'kysely';
import type { AllergenLaw, GivenAnswer, Question } from '$lib/domain/material/questions';
import type { Answer, LimitKind } from '$lib/schemas/material-answers';
import { Refused } from '../refused';
import { newId } from './id';
import type { Trx } from './with-actor';

export interface AnswerRow extends GivenAnswer {
	readonly id: string;
	readonly answer: Answer;
	readonly quantifiedFrom: string | null;
	readonly documentId: string | null;
	readonly documentTitle: string | null;
	readonly dated: string | null;
	readonly remark: string;
	readonly createdAt: Date;
	readonly createdByName: string;
}

/** The newest answer to each question; one that was withdrawn leaves the question open. */
export async function standingAnswers(trx: Trx, materialIds: readonly string[]) {
	if (materialIds.length === 0) return [];
	const { rows } = await sql<AnswerRow & { readonly materialId: string }>`
		select * from (
			select distinct on (a.material_id, a.question) a.id, a.material_id as "materialId", a.question, a.answer, a.law,
				a.version_number as "versionNumber", a.quantified_from as "quantifiedFrom", a.document_id as "documentId",
				d.title as "documentTitle", a.dated, coalesce(a.good_until, d.expires) as "goodUntil", a.remark,
				a.created_at as "createdAt", coalesce(p.name, '') as "createdByName"
			from material_answer a left join document d on d.id = a.document_id left join person p on p.id = a.created_by
			where a.material_id = any(${[...materialIds]}::uuid[])
			order by a.material_id, a.question, a.created_at desc, a.id desc) newest
		where newest.answer <> 'withdrawn'`.execute(trx);
	return rows;
}

export interface NewAnswer {
	readonly materialId: string;
	readonly versionNumber: number;
	readonly question: Question;
	readonly answer: Answer;
	readonly law: AllergenLaw | null;
	readonly quantifiedFrom: string | null;
	readonly documentId: string | null;
	readonly dated: string | null;
	readonly goodUntil: string | null;
	readonly remark: string;
	readonly personId: string;
}

export async function insertAnswer(trx: Trx, answer: NewAnswer): Promise<string> {
	const id = newId();
	await trx
		.insertInto('material_answer')
		.values({
			id,
			material_id: answer.materialId,
			version_number: answer.versionNumber,
			question: answer.question,
			answer: answer.answer,
			law: answer.law,
			quantified_from: answer.quantifiedFrom,
			document_id: answer.documentId,
			dated: answer.dated,
			good_until: answer.goodUntil,
			remark: answer.remark,
			created_by: answer.personId
		})
		.execute();
	return id;
}

export interface LimitRow {
	readonly id: string;
	readonly materialId: string;
	readonly kind: LimitKind;
	readonly category: string | null;
	readonly low: string | null;
	readonly high: string | null;
	readonly documentId: string;
	readonly documentTitle: string;
	readonly page: number | null;
}

const limitRows = (trx: Trx) =>
	trx
		.selectFrom('use_limit')
		.innerJoin('document', 'document.id', 'use_limit.document_id')
		.select([
			'use_limit.id',
			'material_id as materialId',
			'use_limit.kind',
			'category',
			'low',
			'high',
			'document_id as documentId',
			'document.title as documentTitle',
			'page'
		])
		.where('withdrawn_at', 'is', null);

export async function limitsOf(trx: Trx, materialIds: readonly string[]): Promise<readonly LimitRow[]> {
	if (materialIds.length === 0) return [];
	return limitRows(trx)
		.where('material_id', 'in', [...materialIds])
		.orderBy('use_limit.kind')
		.orderBy('use_limit.created_at')
		.execute();
}

/** @throws Refused 'not-found', also when it was withdrawn. */
export async function lockLimit(trx: Trx, id: string): Promise<LimitRow> {
	const row = await limitRows(trx).where('use_limit.id', '=', id).forUpdate('use_limit').executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

export interface NewLimit extends Omit<LimitRow, 'id' | 'documentTitle'> {
	readonly personId: string;
}

export async function insertLimit(trx: Trx, limit: NewLimit): Promise<string> {
	const id = newId();
	await trx
		.insertInto('use_limit')
		.values({
			id,
			material_id: limit.materialId,
			kind: limit.kind,
			category: limit.category,
			low: limit.low,
			high: limit.high,
			document_id: limit.documentId,
			page: limit.page,
			created_by: limit.personId
		})
		.execute();
	return id;
}

export async function withdrawLimit(trx: Trx, id: string): Promise<void> {
	await trx.updateTable('use_limit').set({ withdrawn_at: new Date() }).where('id', '=', id).execute();
}
