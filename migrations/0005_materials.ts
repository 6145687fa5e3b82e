import { sql, type Kysely } from 'kysely';

// Purpose: suppliers, substances, raw materials with their versions and constituents.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table supplier (
			id uuid primary key,
			name text not null unique check (length(name) between 1 and 200),
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`
		create table substance (
			id uuid primary key,
			inci text not null check (length(inci) between 1 and 300),
			name_key text not null unique,
			cas text[] not null default '{}',
			ec text[] not null default '{}',
			colour_index text,
			function text,
			known boolean not null default false,
			created_at timestamptz not null default now(),
			created_by uuid
		)`.execute(db);
	await sql`create index substance_key on substance using gin (name_key gin_trgm_ops)`.execute(db);
	await sql`
		create table material (
			id uuid primary key,
			code text not null unique check (code ~ '^[A-Z0-9][A-Z0-9-]{0,31}$'),
			trade_name text not null check (length(trade_name) between 1 and 200),
			supplier_id uuid not null references supplier,
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`create index material_search on material using gin ((code || ' ' || trade_name) gin_trgm_ops)`.execute(db);
	await sql`create index material_supplier on material (supplier_id)`.execute(db);
	await sql`
		create table material_version (
			id uuid primary key,
			material_id uuid not null references material,
			number integer not null check (number > 0),
			effective_from date,
			state text not null check (state in ('draft', 'released')),
			content_hash text,
			rev integer not null default 1,
			released_at timestamptz,
			released_by uuid references person,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (material_id, number),
			check ((state = 'released') = (content_hash is not null and released_at is not null and effective_from is not null))
		)`.execute(db);
	await sql`create unique index one_material_draft on material_version (material_id) where state = 'draft'`.execute(db);
	await sql`
		create table constituent (
			id uuid primary key,
			material_version_id uuid not null references material_version,
			position integer not null,
			substance_id uuid not null references substance,
			place text not null check (place in ('inSum', 'ofWhich')),
			role text check (role in ('ingredient', 'carryOver', 'impurity', 'processingAid')),
			parent_id uuid references constituent deferrable initially deferred,
			use text not null default 'other' check (use in ('colourant', 'uvFilter', 'hairDye', 'preservative', 'other')),
			nano boolean not null default false,
			low numeric(11, 8) check (low between 0 and 100),
			typical numeric(11, 8) check (typical between 0 and 100),
			high numeric(11, 8) check (high between 0 and 100),
			high_open boolean not null default false,
			cas text,
			ec text,
			source_document_id uuid references document,
			source_page integer check (source_page > 0),
			unique (material_version_id, position) deferrable initially deferred,
			check ((place = 'ofWhich') = (parent_id is not null)),
			check ((place = 'inSum') = (role is not null))
		)`.execute(db);
	await sql`create index constituent_substance on constituent (substance_id)`.execute(db);
	await sql`create index constituent_document on constituent (source_document_id)`.execute(db);

	await sql`
		create trigger material_version_frozen before update or delete on material_version
			for each row execute function refuse_change_once_frozen()`.execute(db);
	await sql`
		create function refuse_constituent_of_released() returns trigger language plpgsql as $$
		begin
			if exists (select 1 from material_version v
				where v.id = (case tg_op when 'DELETE' then old.material_version_id else new.material_version_id end)
				and v.state = 'released') then
				raise exception 'the material version is released' using errcode = 'check_violation';
			end if;
			return case tg_op when 'DELETE' then old else new end;
		end $$`.execute(db);
	await sql`
		create trigger constituent_frozen before insert or update or delete on constituent
			for each row execute function refuse_constituent_of_released()`.execute(db);

	await sql`call open_to_laboratory('supplier', 'insert')`.execute(db);
	await sql`call open_to_laboratory('substance', 'insert, update')`.execute(db);
	await sql`call open_to_laboratory('material', 'insert, update')`.execute(db);
	await sql`call open_to_laboratory('material_version', 'insert, update, delete')`.execute(db);
	await sql`call open_to_laboratory('constituent', 'insert, update, delete')`.execute(db);
}
