import { sql } from 'kysely';
import type { LineView } from '$lib/schemas/grid-view';
import { PAGE_SIZE, type ListQuery, type Page } from '$lib/schemas/paging';
import { Refused } from '../refused';
import type { FormulaVersionRef } from './basis';
import type { Trx } from './with-actor';

export interface FormulaListRow {
	readonly id: string;
	readonly code: string;
	readonly name: string;
	readonly released: number | null;
	readonly draft: number | null;
	readonly lines: number;
	readonly products: number;
}

const SORTS = { code: 'f.code', name: 'f.name' } as const;

export async function listFormulas(trx: Trx, query: ListQuery, limit = PAGE_SIZE): Promise<Page<FormulaListRow>> {
	const pattern = `%${query.q.replace(/[\\%_]/g, '\\$&')}%`;
	const sort = sql.raw(SORTS[query.sort as keyof typeof SORTS] ?? SORTS.code);
	const { rows } = await sql<FormulaListRow>`
		select f.id, f.code, f.name,
			(select max(number) from formula_version v where v.formula_id = f.id and v.state = 'released') as released,
			(select max(number) from formula_version v where v.formula_id = f.id and v.state = 'draft') as draft,
			(select count(*)::int from formula_line l where l.formula_version_id = newest.id) as lines,
			(select count(*)::int from product_formula p where p.formula_id = f.id) as products
		from formula f
		left join lateral (select v.id from formula_version v where v.formula_id = f.id order by number desc limit 1) newest on true
		where f.code || ' ' || f.name ilike ${pattern}
		order by ${sort} ${sql.raw(query.dir)}, f.code limit ${limit} offset ${(query.page - 1) * limit}`.execute(trx);
	const total = await sql<{ total: number }>`
		select count(*)::int as total from formula f where f.code || ' ' || f.name ilike ${pattern}`.execute(trx);
	return { rows, total: total.rows[0]?.total ?? 0, page: query.page, pageSize: limit };
}

export interface FormulaHead {
	readonly id: string;
	readonly code: string;
	readonly name: string;
}

/** @throws Refused 'not-found'. */
export async function formulaByCode(trx: Trx, code: string): Promise<FormulaHead> {
	const row = await trx
		.selectFrom('formula')
		.select(['id', 'code', 'name'])
		.where('code', '=', code)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}

export const versionsOfFormula = (trx: Trx, formulaId: string) =>
	trx
		.selectFrom('formula_version')
		.leftJoin('person', 'person.id', 'formula_version.released_by')
		.select([
			'formula_version.id',
			'formula_version.number',
			'formula_version.state',
			'formula_version.rev',
			'formula_version.released_at as releasedAt',
			'person.name as releasedBy'
		])
		.where('formula_id', '=', formulaId)
		.orderBy('number', 'desc')
		.execute();
export type FormulaVersionRow = Awaited<ReturnType<typeof versionsOfFormula>>[number];

/** A version as the loaders take it; one that is not released counts as released now. */
export const versionRef = (
	formulaId: string,
	version: Pick<FormulaVersionRow, 'id' | 'number' | 'releasedAt'>
): FormulaVersionRef => ({
	id: version.id,
	formulaId,
	number: version.number,
	releasedAt: version.releasedAt ?? new Date()
});

/** @throws Refused 'frozen' when the version is released. */
export async function lockFormulaDraft(trx: Trx, formulaId: string, number: number) {
	const row = await trx
		.selectFrom('formula_version')
		.select(['id', 'rev', 'state', 'number'])
		.where('formula_id', '=', formulaId)
		.where('number', '=', number)
		.forUpdate()
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	if (row.state !== 'draft') throw new Refused('frozen', { number });
	return row;
}

const plain = (share: string | null) => (share === null ? '' : share.replace(/(\.\d*?)0+$/, '$1').replace(/\.$/, ''));

export async function linesOfVersion(trx: Trx, versionId: string): Promise<LineView[]> {
	const rows = await trx
		.selectFrom('formula_line')
		.leftJoin('material', 'material.id', 'formula_line.material_id')
		.leftJoin('formula', 'formula.id', 'formula_line.formula_id')
		.leftJoin('formula_version as pin', 'pin.id', 'formula_line.pinned_version_id')
		.select([
			'formula_line.share_min',
			'formula_line.share_max',
			'formula_line.pin_reason',
			'pin.number as pinned',
			'formula_line.id',
			'formula_line.phase',
			'formula_line.share',
			'formula_line.is_qs',
			'material.code as materialCode',
			'material.trade_name as materialName',
			'formula.code as formulaCode',
			'formula.name as formulaName'
		])
		.where('formula_line.formula_version_id', '=', versionId)
		.orderBy('formula_line.position')
		.execute();
	return rows.map((row) => ({
		id: row.id,
		phase: row.phase,
		kind: row.materialCode === null ? 'formula' : 'material',
		code: row.materialCode ?? row.formulaCode ?? '',
		name: row.materialName ?? row.formulaName ?? '',
		percent: plain(row.share),
		min: plain(row.share_min),
		max: plain(row.share_max),
		qs: row.is_qs,
		pinned: row.pinned,
		pinReason: row.pin_reason ?? ''
	}));
}

/** Materials by name, code or what they contain, for the line that is being added; released ones only. */
export async function findMaterials(
	trx: Trx,
	text: string
): Promise<{ readonly id: string; readonly code: string; readonly name: string }[]> {
	const pattern = `%${text.replace(/[\\%_]/g, '\\$&')}%`;
	const { rows } = await sql<{ id: string; code: string; name: string }>`
		select m.id, m.code, m.trade_name as name from material m
		where exists (select 1 from material_version v where v.material_id = m.id and v.state = 'released')
			and (m.code || ' ' || m.trade_name ilike ${pattern} or exists (
				select 1 from material_version v join constituent c on c.material_version_id = v.id
					join substance s on s.id = c.substance_id
				where v.material_id = m.id and s.inci ilike ${pattern}))
		order by (m.code = upper(${text})) desc, (m.trade_name ilike ${`${pattern.slice(1)}`}) desc,
			(m.code || ' ' || m.trade_name ilike ${pattern}) desc, m.trade_name limit 12`.execute(trx);
	return rows;
}

/** Formulas with a released version, by code or name; never the one that is being written. */
export async function findBulks(
	trx: Trx,
	text: string,
	exceptCode: string
): Promise<{ readonly code: string; readonly name: string; readonly number: number }[]> {
	const pattern = `%${text.replace(/[\\%_]/g, '\\$&')}%`;
	const { rows } = await sql<{ code: string; name: string; number: number }>`
		select f.code, f.name, max(v.number) as number
		from formula f join formula_version v on v.formula_id = f.id and v.state = 'released'
		where f.code || ' ' || f.name ilike ${pattern} and f.code <> ${exceptCode}
		group by f.id order by (f.code = upper(${text})) desc, f.name limit 6`.execute(trx);
	return rows;
}

export const productsOfFormula = (trx: Trx, formulaId: string) =>
	trx
		.selectFrom('product_formula')
		.innerJoin('product', 'product.id', 'product_formula.product_id')
		.innerJoin('client', 'client.id', 'product.client_id')
		.select(['product.slug', 'product.name', 'client.name as client'])
		.where('product_formula.formula_id', '=', formulaId)
		.orderBy('product.name')
		.execute();
