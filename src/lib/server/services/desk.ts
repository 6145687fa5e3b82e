import { sql } from 'kysely';
import type { ProductRow } from '../db/products';
import { listProducts } from '../db/products';
import { requireAct, may } from '../access/acts';
import type { Actor } from '../access/actor';
import type { CopyState } from '../db/schema';
import { withActor, type Trx } from '../db/with-actor';

export interface Waiting {
	readonly kind: 'materialDraft' | 'formulaDraft';
	readonly code: string;
	readonly name: string;
	readonly number: number;
	readonly since: string;
}
/** A label copy that waits for a step of this person's, or that a change made untrue. */
export interface WaitingCopy {
	readonly slug: string;
	readonly product: string;
	readonly number: number | null;
	readonly why: 'inReview' | 'approvedByClient' | 'outOfDate' | 'draft';
	readonly since: string;
}
export interface DeskView {
	readonly copies: readonly WaitingCopy[];
	readonly waiting: readonly Waiting[];
	readonly products: readonly ProductRow[];
	readonly allProducts: number;
}

const MOST_WAITING = 200;

/** What waits for this person, and the products they may see. */
export function readDesk(actor: Actor): Promise<DeskView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const waiting = [
			...(may(actor, 'editMaterial') ? await materialDrafts(trx) : []),
			...(may(actor, 'editFormula') ? await formulaDrafts(trx) : [])
		];
		const { rows, total } = await listProducts(trx, { q: '', page: 1, sort: 'name', dir: 'asc' });
		const copies = may(actor, 'editCopy') ? await waitingCopies(trx) : [];
		return { waiting, copies, products: rows, allProducts: total };
	});
}

const day = (at: Date) => at.toISOString().slice(0, 10);

async function materialDrafts(trx: Trx): Promise<Waiting[]> {
	const rows = await trx
		.selectFrom('material_version')
		.innerJoin('material', 'material.id', 'material_version.material_id')
		.select(['material.code', 'material.trade_name', 'material_version.number', 'material_version.created_at'])
		.where('material_version.state', '=', 'draft')
		.orderBy('material_version.created_at')
		.limit(MOST_WAITING)
		.execute();
	return rows.map((row) => ({
		kind: 'materialDraft',
		code: row.code,
		name: row.trade_name,
		number: row.number,
		since: day(row.created_at)
	}));
}

async function formulaDrafts(trx: Trx): Promise<Waiting[]> {
	const rows = await trx
		.selectFrom('formula_version')
		.innerJoin('formula', 'formula.id', 'formula_version.formula_id')
		.select(['formula.code', 'formula.name', 'formula_version.number', 'formula_version.created_at'])
		.where('formula_version.state', '=', 'draft')
		.orderBy('formula_version.created_at')
		.limit(MOST_WAITING)
		.execute();
	return rows.map((row) => ({
		kind: 'formulaDraft',
		code: row.code,
		name: row.name,
		number: row.number,
		since: day(row.created_at)
	}));
}

async function waitingCopies(trx: Trx): Promise<WaitingCopy[]> {
	const { rows } = await sql<{
		slug: string;
		product: string;
		number: number | null;
		state: CopyState;
		at: Date;
		moved: boolean;
	}>`
		select p.slug, p.name as product, c.number, c.state, c.created_at as at,
			coalesce(r.hash <> j.hash, false) as moved
		from label_copy c
		join product p on p.id = c.product_id
		left join statement_rests r on r.statement_id = c.list_statement_id
		left join projection j on j.product_id = c.product_id
			and j.kind = r.projection_kind and j.subject = r.projection_subject
		where c.state in ('draft', 'inReview', 'approvedByClient')
			or (c.state in ('approvedByLaboratory', 'inUse') and r.hash <> j.hash)
		order by moved desc, c.created_at limit ${MOST_WAITING}`.execute(trx);
	return rows.map(({ slug, product, number, state, at, moved }) => ({
		slug,
		product,
		number,
		why: moved || (state !== 'draft' && state !== 'inReview' && state !== 'approvedByClient') ? 'outOfDate' : state,
		since: day(at)
	}));
}
