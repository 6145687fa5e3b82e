import { sql } from 'kysely';
import type { ImportCells, ImportFault } from '$lib/schemas/material-import';
import { PAGE_SIZE, type Page } from '$lib/schemas/paging';
import { Refused } from '../refused';
import { newId } from './id';
import type { ImportOutcome, ImportState } from './schema';
import type { Trx } from './with-actor';

export interface ImportRecord {
	readonly id: string;
	readonly documentId: string;
	readonly fileName: string;
	readonly state: ImportState;
	readonly problem: Readonly<Record<string, unknown>> | null;
	readonly ignoredColumns: readonly string[];
	readonly totalRows: number;
	readonly faultyRows: number;
	readonly newMaterials: number;
	readonly newVersions: number;
	readonly unchanged: number;
	readonly release: boolean;
	readonly effectiveFrom: string | null;
	readonly jobId: string | null;
	readonly createdAt: Date;
	readonly createdByName: string;
}

const records = (trx: Trx) =>
	trx
		.selectFrom('material_import')
		.leftJoin('person', 'person.id', 'material_import.created_by')
		.select([
			'material_import.id',
			'document_id as documentId',
			'file_name as fileName',
			'material_import.state',
			'problem',
			'ignored_columns as ignoredColumns',
			'total_rows as totalRows',
			'faulty_rows as faultyRows',
			'new_materials as newMaterials',
			'new_versions as newVersions',
			'unchanged',
			'release',
			'effective_from as effectiveFrom',
			'job_id as jobId',
			'material_import.created_at as createdAt',
			sql<string>`coalesce(person.name, '')`.as('createdByName')
		]);

const recordOf = (row: Awaited<ReturnType<ReturnType<typeof records>['executeTakeFirstOrThrow']>>): ImportRecord => ({
	...row,
	problem: row.problem as ImportRecord['problem']
});

/** @throws Refused 'not-found'. */
export async function importById(trx: Trx, id: string): Promise<ImportRecord> {
	const row = await records(trx).where('material_import.id', '=', id).executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return recordOf(row);
}

/** @throws Refused 'not-found', or 'wrong-state' when it is not in one of these. */
export async function lockImport(trx: Trx, id: string, ...states: readonly ImportState[]): Promise<ImportRecord> {
	await trx.selectFrom('material_import').select('id').where('id', '=', id).forUpdate().execute();
	const found = await importById(trx, id);
	if (!states.includes(found.state)) throw new Refused('wrong-state', { state: found.state });
	return found;
}

export async function listImports(trx: Trx, page: number): Promise<Page<ImportRecord>> {
	const rows = await records(trx)
		.orderBy('material_import.created_at', 'desc')
		.limit(PAGE_SIZE)
		.offset((page - 1) * PAGE_SIZE)
		.execute();
	const { total } = await trx
		.selectFrom('material_import')
		.select((make) => make.fn.countAll<string>().as('total'))
		.executeTakeFirstOrThrow();
	return { rows: rows.map(recordOf), total: Number(total), page, pageSize: PAGE_SIZE };
}

export async function insertImport(
	trx: Trx,
	values: { readonly documentId: string; readonly fileName: string; readonly personId: string }
): Promise<string> {
	const id = newId();
	await trx
		.insertInto('material_import')
		.values({
			id,
			document_id: values.documentId,
			file_name: values.fileName,
			state: 'reading',
			created_by: values.personId
		})
		.execute();
	return id;
}

export interface ImportChange {
	readonly state?: ImportState;
	readonly problem?: object | null;
	readonly ignoredColumns?: readonly string[];
	readonly jobId?: string | null;
	readonly release?: boolean;
	readonly effectiveFrom?: string | null;
	readonly committedAt?: Date;
}

const materialsWith = (id: string, outcome: ImportOutcome) =>
	sql<number>`(select count(distinct code)::int from material_import_row
		where import_id = ${id} and outcome = ${outcome})`;

/** Changes what is said of an import and counts its rows anew. */
export async function updateImport(trx: Trx, id: string, change: ImportChange): Promise<void> {
	const { state, problem, ignoredColumns, jobId, release, effectiveFrom, committedAt } = change;
	await trx
		.updateTable('material_import')
		.set({
			...(state === undefined ? {} : { state }),
			...(problem === undefined ? {} : { problem: problem === null ? null : JSON.stringify(problem) }),
			...(ignoredColumns === undefined ? {} : { ignored_columns: [...ignoredColumns] }),
			...(jobId === undefined ? {} : { job_id: jobId }),
			...(release === undefined ? {} : { release }),
			...(effectiveFrom === undefined ? {} : { effective_from: effectiveFrom }),
			...(committedAt === undefined ? {} : { committed_at: committedAt }),
			new_materials: materialsWith(id, 'newMaterial'),
			new_versions: materialsWith(id, 'newVersion'),
			unchanged: materialsWith(id, 'unchanged'),
			total_rows: sql<number>`(select count(*)::int from material_import_row where import_id = ${id})`,
			faulty_rows: sql<number>`(select count(*)::int from material_import_row where import_id = ${id} and faulty)`
		})
		.where('id', '=', id)
		.execute();
}

export interface StoredRow {
	readonly number: number;
	readonly code: string;
	readonly cells: ImportCells;
	readonly faults: readonly ImportFault[];
	readonly outcome: ImportOutcome;
}

const BATCH = 1_000;

/** Writes rows over those of the same number. */
export async function putRows(trx: Trx, importId: string, rows: readonly StoredRow[]): Promise<void> {
	for (let from = 0; from < rows.length; from += BATCH) {
		await trx
			.insertInto('material_import_row')
			.values(
				rows.slice(from, from + BATCH).map((row) => ({
					import_id: importId,
					number: row.number,
					code: row.code,
					cells: JSON.stringify(row.cells),
					faults: JSON.stringify(row.faults),
					faulty: row.faults.length > 0,
					outcome: row.outcome
				}))
			)
			.onConflict((conflict) =>
				conflict.columns(['import_id', 'number']).doUpdateSet({
					code: (eb) => eb.ref('excluded.code'),
					cells: (eb) => eb.ref('excluded.cells'),
					faults: (eb) => eb.ref('excluded.faults'),
					faulty: (eb) => eb.ref('excluded.faulty'),
					outcome: (eb) => eb.ref('excluded.outcome')
				})
			)
			.execute();
	}
}

export const removeRows = async (trx: Trx, importId: string): Promise<void> => {
	await trx.deleteFrom('material_import_row').where('import_id', '=', importId).execute();
};

const storedOf = (row: Omit<StoredRow, 'cells' | 'faults'> & { cells: unknown; faults: unknown }): StoredRow => ({
	...row,
	cells: row.cells as ImportCells,
	faults: row.faults as readonly ImportFault[]
});

export async function importRows(
	trx: Trx,
	importId: string,
	codes: readonly string[] | 'all'
): Promise<readonly StoredRow[]> {
	const rows = await trx
		.selectFrom('material_import_row')
		.select(['number', 'code', 'cells', 'faults', 'outcome'])
		.where('import_id', '=', importId)
		.$if(codes !== 'all', (query) => query.where('code', 'in', codes === 'all' ? [] : [...codes]))
		.orderBy('number')
		.execute();
	return rows.map(storedOf);
}

/** @throws Refused 'not-found'. */
export async function importRow(trx: Trx, importId: string, number: number): Promise<StoredRow> {
	const row = await trx
		.selectFrom('material_import_row')
		.select(['number', 'code', 'cells', 'faults', 'outcome'])
		.where('import_id', '=', importId)
		.where('number', '=', number)
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return storedOf(row);
}

export async function pageOfRows(
	trx: Trx,
	importId: string,
	faultyOnly: boolean,
	page: number
): Promise<Page<StoredRow>> {
	const found = trx
		.selectFrom('material_import_row')
		.where('import_id', '=', importId)
		.$if(faultyOnly, (query) => query.where('faulty', '=', true));
	const rows = await found
		.select(['number', 'code', 'cells', 'faults', 'outcome'])
		.orderBy('number')
		.limit(PAGE_SIZE)
		.offset((page - 1) * PAGE_SIZE)
		.execute();
	const { total } = await found.select((make) => make.fn.countAll<string>().as('total')).executeTakeFirstOrThrow();
	return { rows: rows.map(storedOf), total: Number(total), page, pageSize: PAGE_SIZE };
}

export interface PresentMaterial {
	readonly id: string;
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly draft: number | null;
	readonly newest: number;
	readonly newestVersionId: string;
}

/** Materials of these codes with their newest version. */
export async function materialsOfCodes(trx: Trx, codes: readonly string[]): Promise<readonly PresentMaterial[]> {
	const { rows } = await sql<PresentMaterial>`
		select m.id, m.code, m.trade_name as "tradeName", s.name as supplier, newest.number as newest,
			newest.id as "newestVersionId", case newest.state when 'draft' then newest.number end as draft
		from material m join supplier s on s.id = m.supplier_id
		join lateral (select v.id, v.number, v.state from material_version v where v.material_id = m.id
			order by v.number desc limit 1) newest on true
		where m.code = any(${[...codes]}::text[])`.execute(trx);
	return rows;
}

/** Ids of the documents of these titles, in small letters. */
export async function documentsTitled(
	trx: Trx,
	titles: readonly string[]
): Promise<ReadonlyMap<string, readonly string[]>> {
	const wanted = [...new Set(titles.map((title) => title.toLowerCase()))];
	const found = new Map<string, string[]>();
	if (wanted.length === 0) return found;
	const { rows } = await sql<{ id: string; title: string }>`
		select id, lower(title) as title from document d where lower(title) = any(${wanted}::text[])
			and not exists (select 1 from document newer where newer.supersedes_id = d.id)`.execute(trx);
	for (const { id, title } of rows) found.set(title, [...(found.get(title) ?? []), id]);
	return found;
}
