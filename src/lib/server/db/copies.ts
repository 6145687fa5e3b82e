import { sql } from 'kysely';
import type { LabelContent } from '$lib/domain/label/types';
import { copyBasisSchema, labelContentSchema, type CopyBasis } from '$lib/schemas/label-copy';
import type { ApprovalView, CopyHead, EffectView } from '$lib/schemas/copy-view';
import { Refused } from '../refused';
import type { CopyState, Market } from './schema';
import type { Trx } from './with-actor';

export interface CopyRow {
	readonly id: string;
	readonly productId: string;
	readonly clientId: string;
	readonly packId: string;
	readonly packName: string;
	readonly market: Market;
	readonly number: number | null;
	readonly state: CopyState;
	readonly content: LabelContent;
	readonly contentHash: string | null;
	readonly formulaVersionId: string | null;
	readonly basis: CopyBasis | null;
	readonly batchDay: string | null;
	readonly why: string | null;
	readonly listedAt: Date | null;
	readonly firstBatch: string | null;
	readonly lastBatch: string | null;
	readonly replacesId: string | null;
	readonly rev: number;
	readonly createdAt: Date;
	readonly createdByName: string;
	/** What its list rests on has changed since; never for a draft, which rests on nothing. */
	readonly outOfDate: boolean;
	/** What the product rests on moved and nobody has read it again yet. */
	readonly beingRechecked: boolean;
	readonly overtaken: boolean;
}

const copyRows = (trx: Trx) =>
	trx
		.selectFrom('label_copy')
		.innerJoin('pack', 'pack.id', 'label_copy.pack_id')
		.innerJoin('product', 'product.id', 'label_copy.product_id')
		.innerJoin('person', 'person.id', 'label_copy.created_by')
		.leftJoin('statement', 'statement.id', 'label_copy.list_statement_id')
		.leftJoin('statement_rests as rest', 'rest.statement_id', 'label_copy.list_statement_id')
		.leftJoin('projection', (join) =>
			join
				.onRef('projection.product_id', '=', 'label_copy.product_id')
				.on('projection.kind', '=', 'list')
				.onRef('projection.subject', '=', 'label_copy.market')
		)
		.select([
			'label_copy.id',
			'label_copy.product_id as productId',
			'label_copy.client_id as clientId',
			'label_copy.pack_id as packId',
			'pack.name as packName',
			'label_copy.market',
			'label_copy.number',
			'label_copy.state',
			'label_copy.content',
			'label_copy.content_hash as contentHash',
			'label_copy.formula_version_id as formulaVersionId',
			'label_copy.basis',
			sql<string | null>`label_copy.batch_day::text`.as('batchDay'),
			'statement.why',
			'statement.at as listedAt',
			'label_copy.first_batch as firstBatch',
			'label_copy.last_batch as lastBatch',
			'label_copy.replaces_id as replacesId',
			'label_copy.rev',
			'label_copy.created_at as createdAt',
			'person.name as createdByName',
			sql<boolean>`coalesce(rest.hash is distinct from projection.hash and rest.hash is not null, false)`.as(
				'outOfDate'
			),
			sql<boolean>`coalesce(projection.inputs_rev < product.inputs_rev, true)`.as('beingRechecked'),
			sql<boolean>`label_copy.state = 'approvedByClient' and exists (
				select 1 from label_copy later where later.pack_id = label_copy.pack_id
					and later.market = label_copy.market and later.number > label_copy.number
					and later.state in ('approvedByClient', 'inUse', 'superseded'))`.as('overtaken')
		]);

type Raw = Awaited<ReturnType<ReturnType<typeof copyRows>['execute']>>[number];

const rowOf = (raw: Raw): CopyRow => ({
	...raw,
	content: labelContentSchema.parse(raw.content),
	basis: raw.basis === null ? null : copyBasisSchema.parse(raw.basis)
});

/** All copies of a product, the newest first. */
export async function copiesOf(trx: Trx, productId: string): Promise<CopyRow[]> {
	const rows = await copyRows(trx)
		.where('label_copy.product_id', '=', productId)
		.orderBy('label_copy.created_at', 'desc')
		.orderBy('label_copy.id', 'desc')
		.execute();
	return rows.map(rowOf);
}

/** @throws Refused 'not-found', also for a copy that this actor may not see. */
export async function copyById(trx: Trx, productId: string, id: string): Promise<CopyRow> {
	const row = await copyRows(trx)
		.where('label_copy.product_id', '=', productId)
		.where('label_copy.id', '=', id)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return rowOf(row);
}

/**
 * The copy for a step of its life. The product's row is locked first, as every release does, so that nothing it rests on
 * moves between the check and the step.
 * @throws Refused 'not-found'.
 */
export async function lockCopy(trx: Trx, productId: string, id: string): Promise<CopyRow> {
	await lockProduct(trx, productId);
	const found = await trx
		.selectFrom('label_copy')
		.select('id')
		.where('product_id', '=', productId)
		.where('id', '=', id)
		.forUpdate()
		.executeTakeFirst();
	if (!found) throw new Refused('not-found');
	return copyById(trx, productId, id);
}

export const lockProduct = (trx: Trx, productId: string) =>
	trx.selectFrom('product').select('id').where('id', '=', productId).forUpdate().executeTakeFirstOrThrow();

/** The next number of a product's copies. The counter's row stays locked until the transaction ends: no number is lost. */
export async function takeNumber(trx: Trx, productId: string): Promise<number> {
	const scope = `copy/${productId}`;
	await trx
		.insertInto('counter')
		.values({ scope })
		.onConflict((conflict) => conflict.column('scope').doNothing())
		.execute();
	const { next } = await trx
		.selectFrom('counter')
		.select('next')
		.where('scope', '=', scope)
		.forUpdate()
		.executeTakeFirstOrThrow();
	await trx
		.updateTable('counter')
		.set({ next: next + 1 })
		.where('scope', '=', scope)
		.execute();
	return next;
}

/** The sets of released versions that frozen copies of a product were made from, oldest first; a basis is numbered by its place. */
export async function basesOf(trx: Trx, productId: string): Promise<readonly string[]> {
	const { rows } = await sql<{ hash: string }>`
		select basis ->> 'hash' as hash from label_copy
		where product_id = ${productId} and basis is not null
		group by basis ->> 'hash' order by min((basis ->> 'number')::integer)`.execute(trx);
	return rows.map((row) => row.hash);
}

export async function approvalsOf(trx: Trx, copyIds: readonly string[]): Promise<ReadonlyMap<string, ApprovalView[]>> {
	if (copyIds.length === 0) return new Map();
	const rows = await trx
		.selectFrom('label_approval')
		.innerJoin('person', 'person.id', 'label_approval.person_id')
		.select([
			'label_approval.copy_id',
			'label_approval.as_role',
			'label_approval.decision',
			'label_approval.comment',
			'label_approval.at',
			'person.name'
		])
		.where('label_approval.copy_id', 'in', [...copyIds])
		.orderBy('label_approval.at')
		.orderBy('label_approval.id')
		.execute();
	return grouped(rows, (row) => ({
		role: row.as_role,
		decision: row.decision,
		name: row.name,
		at: row.at.toISOString(),
		comment: row.comment
	}));
}

export async function effectsOf(trx: Trx, copyIds: readonly string[]): Promise<ReadonlyMap<string, EffectView[]>> {
	if (copyIds.length === 0) return new Map();
	const rows = await trx
		.selectFrom('copy_effect')
		.selectAll()
		.where('copy_id', 'in', [...copyIds])
		.orderBy('at', 'desc')
		.orderBy('id', 'desc')
		.execute();
	return grouped(rows, (row) => ({
		id: row.id,
		effect: row.effect,
		causeKind: row.cause_kind,
		cause: row.cause,
		oldText: row.old_text,
		newText: row.new_text,
		at: row.at.toISOString()
	}));
}

function grouped<R extends { readonly copy_id: string }, T>(rows: readonly R[], view: (row: R) => T): Map<string, T[]> {
	const found = new Map<string, T[]>();
	for (const row of rows) found.set(row.copy_id, [...(found.get(row.copy_id) ?? []), view(row)]);
	return found;
}

export const headOf = (row: CopyRow): CopyHead => ({
	id: row.id,
	packId: row.packId,
	packName: row.packName,
	market: row.market,
	number: row.number,
	state: row.state,
	outOfDate: row.outOfDate,
	beingRechecked: row.beingRechecked,
	overtaken: row.overtaken,
	firstBatch: row.firstBatch,
	lastBatch: row.lastBatch,
	contentHash: row.contentHash,
	createdAt: row.createdAt.toISOString(),
	createdBy: row.createdByName
});

/** Copies whose text stands for something outside the laboratory. */
const LIVE: readonly CopyState[] = ['inReview', 'approvedByLaboratory', 'approvedByClient', 'inUse'];

export interface LiveCopy {
	readonly id: string;
	readonly number: number | null;
	readonly state: CopyState;
	/** The list as the copy prints it; every frozen copy's content has one. */
	readonly ingredients: string;
}

export async function liveCopiesOf(trx: Trx, productId: string): Promise<readonly LiveCopy[]> {
	const rows = await trx
		.selectFrom('label_copy')
		.select(['id', 'number', 'state', 'content'])
		.where('product_id', '=', productId)
		.where('state', 'in', [...LIVE])
		.orderBy('id')
		.execute();
	return rows.map(({ content, ...row }) => ({ ...row, ingredients: ingredientsOf(content) }));
}

function ingredientsOf(content: unknown): string {
	if (typeof content !== 'object' || content === null) return '';
	const { ingredients } = content as { ingredients?: unknown };
	return typeof ingredients === 'string' ? ingredients : '';
}
