import type { ProductRow } from '../db/products';
import { listProducts } from '../db/products';
import { requireAct, may } from '../access/acts';
import type { Actor } from '../access/actor';
import { withActor, type Trx } from '../db/with-actor';

export interface Waiting {
	readonly kind: 'materialDraft' | 'formulaDraft';
	readonly code: string;
	readonly name: string;
	readonly number: number;
	readonly since: string;
}
export interface DeskView {
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
		return { waiting, products: rows, allProducts: total };
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
