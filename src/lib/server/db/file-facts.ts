import type { FileDocument, FileFacts } from '$lib/domain/file/readiness';
import type { IsoDate } from '$lib/domain/quantity/units';
import type { ProductRow } from './products';
import type { Trx } from './with-actor';

type Materials = FileFacts['materials'];

/** The documents of each material, by the kinds that the sections ask for. */
export async function materialDocuments(
	trx: Trx,
	materials: readonly { readonly materialId: string; readonly code: string; readonly tradeName: string }[]
): Promise<Materials> {
	if (materials.length === 0) return [];
	const rows = await trx
		.selectFrom('document_link')
		.innerJoin('document', 'document.id', 'document_link.document_id')
		.select([
			'document_link.subject_id as materialId',
			'document.id',
			'document.kind',
			'document.title',
			'document.expires'
		])
		.where('document_link.subject_kind', '=', 'material')
		.where(
			'document_link.subject_id',
			'in',
			materials.map(({ materialId }) => materialId)
		)
		.where('document_link.withdrawn_at', 'is', null)
		.orderBy('document.created_at')
		.execute();
	return materials.map(({ materialId, code, tradeName }) => ({
		code,
		name: tradeName,
		documents: rows.filter((row) => row.materialId === materialId).map(documentOf)
	}));
}

const documentOf = (row: { id: string; kind: string; title: string; expires: string | null }): FileDocument => ({
	id: row.id,
	kind: row.kind,
	title: row.title,
	expires: row.expires as IsoDate | null
});

export async function filedDocuments(trx: Trx, productId: string): Promise<FileFacts['filed']> {
	const rows = await trx
		.selectFrom('document_link')
		.innerJoin('document', 'document.id', 'document_link.document_id')
		.select(['need', 'formula_version_id', 'document.id', 'document.kind', 'document.title', 'document.expires'])
		.where('subject_kind', '=', 'product')
		.where('subject_id', '=', productId)
		.where('withdrawn_at', 'is', null)
		.orderBy('document_link.created_at')
		.execute();
	return rows.flatMap(({ need, formula_version_id, ...row }) =>
		need === null ? [] : [{ need, document: documentOf(row), formulaVersion: formula_version_id }]
	);
}

export interface NeedDecisionRow {
	readonly need: string;
	readonly applicable: boolean;
	readonly reason: string;
	readonly by: string;
	readonly at: Date;
}

/** The latest decision on each need. */
export const needDecisions = (trx: Trx, productId: string): Promise<NeedDecisionRow[]> =>
	trx
		.selectFrom('need_decision')
		.innerJoin('person', 'person.id', 'need_decision.by_person')
		.distinctOn('need')
		.select(['need', 'applicable', 'reason', 'person.name as by', 'at'])
		.where('product_id', '=', productId)
		.orderBy('need')
		.orderBy('at', 'desc')
		.execute();

/** The newest copy that the client approved or that is in use, and whether the list still says the same. */
export async function copyStanding(trx: Trx, productId: string): Promise<FileFacts['copy']> {
	const rows = await trx
		.selectFrom('label_copy')
		.leftJoin('statement_rests', 'statement_rests.statement_id', 'label_copy.list_statement_id')
		.leftJoin('projection', (join) =>
			join
				.onRef('projection.product_id', '=', 'label_copy.product_id')
				.onRef('projection.kind', '=', 'statement_rests.projection_kind')
				.onRef('projection.subject', '=', 'statement_rests.projection_subject')
		)
		.select(['label_copy.state', 'statement_rests.hash as rests', 'projection.hash as now'])
		.where('label_copy.product_id', '=', productId)
		.orderBy('label_copy.created_at', 'desc')
		.execute();
	const approved = rows.find(({ state }) => state === 'approvedByClient' || state === 'inUse');
	if (!approved) return rows.length === 0 ? 'none' : 'unapproved';
	return approved.rests === approved.now ? 'approved' : 'outOfDate';
}

/** False while the product's statements have not been compared with its present inputs. */
export async function isBeingRechecked(trx: Trx, product: ProductRow): Promise<boolean> {
	const row = await trx
		.selectFrom('projection')
		.select('inputs_rev')
		.where('product_id', '=', product.id)
		.where('kind', '=', 'list')
		.executeTakeFirst();
	return row !== undefined && BigInt(row.inputs_rev) < BigInt(product.inputsRev);
}

export interface BoundDocument {
	readonly id: string;
	readonly title: string;
	readonly kind: string;
	readonly sha256: string;
	readonly pages: number | null;
	readonly dated: string | null;
	readonly encrypted: boolean;
	readonly broken: boolean;
}

export async function boundDocuments(trx: Trx, ids: readonly string[]): Promise<BoundDocument[]> {
	if (ids.length === 0) return [];
	return trx
		.selectFrom('document')
		.innerJoin('file_object', 'file_object.sha256', 'document.sha256')
		.select([
			'document.id',
			'document.title',
			'document.kind',
			'document.sha256',
			'file_object.pages',
			'document.dated',
			'file_object.encrypted',
			'file_object.broken'
		])
		.where('document.id', 'in', [...ids])
		.orderBy('document.title')
		.orderBy('document.id')
		.execute();
}
