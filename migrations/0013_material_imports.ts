import { sql, type Kysely } from 'kysely';

// Purpose: imports of materials from a sheet, judged row by row before anything is made; the origin of a constituent.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		alter table constituent add column origin text
		check (origin in ('plant', 'animal', 'mineral', 'synthetic', 'biotechnological', 'mixed'))`.execute(db);
	await sql`
		create table material_import (
			id uuid primary key,
			document_id uuid not null references document,
			file_name text not null check (length(file_name) between 1 and 255),
			state text not null
				check (state in ('reading', 'unreadable', 'judged', 'committing', 'committed', 'discarded')),
			problem jsonb,
			ignored_columns text[] not null default '{}',
			total_rows integer not null default 0,
			faulty_rows integer not null default 0,
			new_materials integer not null default 0,
			new_versions integer not null default 0,
			unchanged integer not null default 0,
			release boolean not null default false,
			effective_from date,
			job_id uuid,
			committed_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`create index material_import_newest on material_import (created_at desc)`.execute(db);
	await sql`
		create table material_import_row (
			import_id uuid not null references material_import,
			number integer not null check (number > 0),
			code text not null,
			cells jsonb not null,
			faults jsonb not null default '[]' check (jsonb_typeof(faults) = 'array'),
			faulty boolean not null default false,
			outcome text not null check (outcome in ('faulty', 'newMaterial', 'newVersion', 'unchanged')),
			primary key (import_id, number)
		)`.execute(db);
	await sql`create index material_import_row_code on material_import_row (import_id, code)`.execute(db);
	await sql`create index material_import_row_faulty on material_import_row (import_id, number) where faulty`.execute(
		db
	);
	await sql`call open_to_laboratory('material_import', 'insert, update')`.execute(db);
	await sql`call open_to_laboratory('material_import_row', 'insert, update, delete')`.execute(db);
}
