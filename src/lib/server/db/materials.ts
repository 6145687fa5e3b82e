import { sql } from 'kysely';
import { PAGE_SIZE, type ListQuery, type Page } from '$lib/schemas/paging';
import { Refused } from '../refused';
import { newId } from './id';
import type { Trx } from './with-actor';

export interface MaterialListRow {
	readonly id: string;
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly released: number | null;
	readonly draft: number | null;
	readonly contains: readonly string[];
	readonly usedIn: number;
	readonly constituents: number;
	readonly documented: number;
}
export interface MaterialFilter extends ListQuery {
	readonly supplier: string;
}

const SORTS = { code: 'm.code', name: 'm.trade_name', supplier: 's.name', used: '"usedIn"' } as const;

/** Trade name, code, supplier, INCI or CAS; one row a material, its newest version speaking for it. */
export async function listMaterials(
	trx: Trx,
	filter: MaterialFilter,
	limit = PAGE_SIZE
): Promise<Page<MaterialListRow>> {
	const pattern = `%${filter.q.replace(/[\\%_]/g, '\\$&')}%`;
	const sort = sql.raw(SORTS[filter.sort as keyof typeof SORTS] ?? SORTS.name);
	const direction = sql.raw(filter.dir);
	const found = sql`
		(m.code || ' ' || m.trade_name ilike ${pattern} or s.name ilike ${pattern} or exists (
			select 1 from constituent c join substance x on x.id = c.substance_id
			where c.material_version_id = newest.id and (x.inci ilike ${pattern} or c.cas ilike ${pattern})))
		and (${filter.supplier} = '' or s.name = ${filter.supplier})`;
	const from = sql`
		from material m join supplier s on s.id = m.supplier_id
		left join lateral (select v.id from material_version v where v.material_id = m.id
			order by v.number desc limit 1) newest on true`;
	const { rows } = await sql<MaterialListRow>`
		select m.id, m.code, m.trade_name as "tradeName", s.name as supplier,
			(select max(number) from material_version v where v.material_id = m.id and v.state = 'released') as released,
			(select max(number) from material_version v where v.material_id = m.id and v.state = 'draft') as draft,
			coalesce((select array_agg(x.inci order by c.position) from constituent c join substance x on x.id = c.substance_id
				where c.material_version_id = newest.id and c.place = 'inSum'), '{}') as contains,
			(select count(distinct v.formula_id)::int from formula_line l join formula_version v on v.id = l.formula_version_id
				where l.material_id = m.id) as "usedIn",
			(select count(*)::int from constituent c where c.material_version_id = newest.id) as constituents,
			(select count(*)::int from constituent c where c.material_version_id = newest.id
				and c.source_document_id is not null) as documented
		${from} where ${found}
		order by ${sort} ${direction}, m.code limit ${limit} offset ${(filter.page - 1) * limit}`.execute(trx);
	const total = await sql<{ total: number }>`select count(*)::int as total ${from} where ${found}`.execute(trx);
	return { rows, total: total.rows[0]?.total ?? 0, page: filter.page, pageSize: limit };
}

export const listSuppliers = async (trx: Trx): Promise<string[]> =>
	(await trx.selectFrom('supplier').select('name').orderBy('name').execute()).map((row) => row.name);

export interface MaterialHead {
	readonly id: string;
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
}

/** @throws Refused 'not-found'. */
export async function materialByCode(trx: Trx, code: string): Promise<MaterialHead> {
	const row = await trx
		.selectFrom('material')
		.innerJoin('supplier', 'supplier.id', 'material.supplier_id')
		.select(['material.id', 'material.code', 'material.trade_name as tradeName', 'supplier.name as supplier'])
		.where('material.code', '=', code)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

export interface VersionRow {
	readonly id: string;
	readonly number: number;
	readonly state: 'draft' | 'released';
	readonly rev: number;
	readonly effectiveFrom: string | null;
	readonly releasedAt: Date | null;
	readonly releasedBy: string | null;
	readonly contentHash: string | null;
}

export const versionsOfMaterial = (trx: Trx, materialId: string): Promise<VersionRow[]> =>
	trx
		.selectFrom('material_version')
		.leftJoin('person', 'person.id', 'material_version.released_by')
		.select([
			'material_version.id',
			'material_version.number',
			'material_version.state',
			'material_version.rev',
			'material_version.effective_from as effectiveFrom',
			'material_version.released_at as releasedAt',
			'person.name as releasedBy',
			'material_version.content_hash as contentHash'
		])
		.where('material_id', '=', materialId)
		.orderBy('number', 'desc')
		.execute();

/** The draft, locked until the transaction ends. @throws Refused 'frozen' when the version is released. */
export async function lockMaterialDraft(trx: Trx, materialId: string, number: number) {
	const row = await trx
		.selectFrom('material_version')
		.select(['id', 'rev', 'state', 'number'])
		.where('material_id', '=', materialId)
		.where('number', '=', number)
		.forUpdate()
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	if (row.state !== 'draft') throw new Refused('frozen', { number });
	return row;
}

export async function supplierNamed(trx: Trx, name: string, personId: string): Promise<string> {
	await trx
		.insertInto('supplier')
		.values({ id: newId(), name, created_by: personId })
		.onConflict((conflict) => conflict.column('name').doNothing())
		.execute();
	const { id } = await trx.selectFrom('supplier').select('id').where('name', '=', name).executeTakeFirstOrThrow();
	return id;
}

export interface UseRow {
	readonly code: string;
	readonly name: string;
	readonly number: number;
	readonly state: string;
	readonly share: string | null;
	readonly isQs: boolean;
}

/** Formulas whose newest version weighs the material. */
export const whereUsed = async (trx: Trx, materialId: string): Promise<UseRow[]> =>
	(
		await sql<UseRow>`
			select f.code, f.name, v.number, v.state, l.share::text as share, l.is_qs as "isQs"
			from formula f
			join lateral (select * from formula_version v where v.formula_id = f.id order by number desc limit 1) v on true
			join formula_line l on l.formula_version_id = v.id and l.material_id = ${materialId}
			order by f.code limit 200`.execute(trx)
	).rows;
