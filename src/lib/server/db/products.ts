import { sql } from 'kysely';
import type { ListQuery, Page } from '$lib/schemas/paging';
import { PAGE_SIZE } from '$lib/schemas/paging';
import { Refused } from '../refused';
import type { Trx } from './with-actor';

export interface ProductRow {
	readonly id: string;
	readonly clientId: string;
	readonly clientName: string;
	readonly slug: string;
	readonly name: string;
	readonly brandName: string;
	readonly functionText: string;
	readonly productType: string;
	readonly stay: 'leave-on' | 'rinse-off';
	readonly sites: readonly string[];
	readonly ages: readonly string[];
	readonly spray: 'none' | 'pump' | 'aerosol';
	readonly inputsRev: string;
	readonly rev: number;
	readonly formulaId: string;
	readonly formulaCode: string;
	readonly formulaName: string;
	readonly pinnedVersionId: string | null;
	readonly clientCode: string | null;
}

const productRows = (trx: Trx) =>
	trx
		.selectFrom('product')
		.innerJoin('client', 'client.id', 'product.client_id')
		.innerJoin('product_formula', 'product_formula.product_id', 'product.id')
		.leftJoin('formula', 'formula.id', 'product_formula.formula_id')
		.select([
			'product.id',
			'product.client_id as clientId',
			'client.name as clientName',
			'product.slug',
			'product.name',
			'product.brand_name as brandName',
			'product.function_text as functionText',
			'product.product_type as productType',
			'product.stay',
			'product.sites',
			'product.ages',
			'product.spray',
			'product.inputs_rev as inputsRev',
			'product.rev',
			'product_formula.formula_id as formulaId',
			// A client's actor cannot read the laboratory's formulas; the code then stays empty.
			sql<string>`coalesce(formula.code, '')`.as('formulaCode'),
			sql<string>`coalesce(formula.name, '')`.as('formulaName'),
			'product_formula.pinned_version_id as pinnedVersionId',
			'product_formula.client_code as clientCode'
		]);

/** @throws Refused 'not-found', also for a product that this actor may not see. */
export async function productBySlug(trx: Trx, slug: string): Promise<ProductRow> {
	const row = await productRows(trx).where('product.slug', '=', slug).executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

export async function productById(trx: Trx, id: string): Promise<ProductRow> {
	const row = await productRows(trx).where('product.id', '=', id).executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

const SORTS = { name: 'product.name', client: 'client.name', formula: 'formula.code' } as const;

export async function listProducts(trx: Trx, query: ListQuery): Promise<Page<ProductRow>> {
	const pattern = `%${query.q.replace(/[\\%_]/g, '\\$&')}%`;
	const found = sql<boolean>`(product.name || ' ' || product.brand_name ilike ${pattern} or client.name ilike ${pattern})`;
	const sort = SORTS[query.sort as keyof typeof SORTS] ?? SORTS.name;
	const rows = await productRows(trx)
		.where(found)
		.orderBy(sql.ref(sort), query.dir)
		.orderBy('product.id')
		.limit(PAGE_SIZE)
		.offset((query.page - 1) * PAGE_SIZE)
		.execute();
	const { total } = await trx
		.selectFrom('product')
		.innerJoin('client', 'client.id', 'product.client_id')
		.select((eb) => eb.fn.countAll<string>().as('total'))
		.where(found)
		.executeTakeFirstOrThrow();
	return { rows, total: Number(total), page: query.page, pageSize: PAGE_SIZE };
}

export interface MarketRow {
	readonly market: string;
	readonly responsibleName: string;
	readonly responsibleAddress: string;
	readonly originCountry: string;
}

export const marketsOf = (trx: Trx, productId: string): Promise<MarketRow[]> =>
	trx
		.selectFrom('product_market')
		.select([
			'market',
			'responsible_name as responsibleName',
			'responsible_address as responsibleAddress',
			'origin_country as originCountry'
		])
		.where('product_id', '=', productId)
		.orderBy('market')
		.execute();

export interface PackRow {
	readonly id: string;
	readonly name: string;
	readonly size: string;
	readonly unit: 'ml' | 'g';
	readonly gtin: string | null;
}

export const packsOf = (trx: Trx, productId: string): Promise<PackRow[]> =>
	trx
		.selectFrom('pack')
		.select(['id', 'name', 'size', 'unit', 'gtin'])
		.where('product_id', '=', productId)
		.orderBy('created_at')
		.orderBy('id')
		.execute();

/** Products whose composition may move with these formulas, directly or through a bulk at any depth. */
export async function productsUsingFormulas(trx: Trx, formulaIds: readonly string[]): Promise<string[]> {
	if (formulaIds.length === 0) return [];
	const { rows } = await sql<{ id: string }>`
		with recursive upward(formula_id) as (
			select unnest(${sql.val(`{${formulaIds.join(',')}}`)}::uuid[])
			union
			select v.formula_id from upward u
				join formula_line l on l.formula_id = u.formula_id
				join formula_version v on v.id = l.formula_version_id
		)
		select distinct p.product_id as id from product_formula p join upward u on u.formula_id = p.formula_id
		order by 1`.execute(trx);
	return rows.map((row) => row.id);
}

export async function formulasUsingMaterial(trx: Trx, materialId: string): Promise<string[]> {
	const rows = await trx
		.selectFrom('formula_line')
		.innerJoin('formula_version', 'formula_version.id', 'formula_line.formula_version_id')
		.select('formula_version.formula_id')
		.distinct()
		.where('formula_line.material_id', '=', materialId)
		.execute();
	return rows.map((row) => row.formula_id);
}
