import { sql, type Kysely } from 'kysely';

// Purpose: formulas, their versions and lines; a formula stands alone and belongs to the laboratory.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table formula (
			id uuid primary key,
			code text not null unique check (code ~ '^[A-Z0-9][A-Z0-9-]{0,31}$'),
			name text not null check (length(name) between 1 and 200),
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`create index formula_search on formula using gin ((code || ' ' || name) gin_trgm_ops)`.execute(db);
	await sql`
		create table formula_version (
			id uuid primary key,
			formula_id uuid not null references formula,
			number integer not null check (number > 0),
			state text not null check (state in ('draft', 'released')),
			rev integer not null default 1,
			content_hash text,
			released_at timestamptz,
			released_by uuid references person,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (formula_id, number),
			check ((state = 'released') = (content_hash is not null and released_at is not null))
		)`.execute(db);
	await sql`create unique index one_formula_draft on formula_version (formula_id) where state = 'draft'`.execute(db);
	await sql`
		create table formula_line (
			id uuid primary key,
			formula_version_id uuid not null references formula_version,
			position integer not null,
			phase text not null default 'A' check (length(phase) between 1 and 8),
			material_id uuid references material,
			formula_id uuid references formula,
			pinned_version_id uuid references formula_version,
			share_min numeric(9, 6) check (share_min between 0 and 100),
			share numeric(9, 6) check (share between 0 and 100),
			share_max numeric(9, 6) check (share_max between 0 and 100),
			is_qs boolean not null default false,
			unique (formula_version_id, position) deferrable initially deferred,
			check ((material_id is null) <> (formula_id is null)),
			check (pinned_version_id is null or formula_id is not null),
			check (not is_qs or (share_min is null and share is null and share_max is null))
		)`.execute(db);
	await sql`create index formula_line_material on formula_line (material_id)`.execute(db);
	await sql`create index formula_line_formula on formula_line (formula_id)`.execute(db);
	await sql`
		create unique index one_qs_line on formula_line (formula_version_id) where is_qs`.execute(db);
	await sql`
		create trigger formula_version_frozen before update or delete on formula_version
			for each row execute function refuse_change_once_frozen()`.execute(db);
	await sql`
		create function refuse_line_of_released() returns trigger language plpgsql as $$
		begin
			if exists (select 1 from formula_version v
				where v.id = (case tg_op when 'DELETE' then old.formula_version_id else new.formula_version_id end)
				and v.state = 'released') then
				raise exception 'the formula version is released' using errcode = 'check_violation';
			end if;
			return case tg_op when 'DELETE' then old else new end;
		end $$`.execute(db);
	await sql`
		create trigger formula_line_frozen before insert or update or delete on formula_line
			for each row execute function refuse_line_of_released()`.execute(db);
	await sql`call open_to_laboratory('formula', 'insert, update')`.execute(db);
	await sql`call open_to_laboratory('formula_version', 'insert, update, delete')`.execute(db);
	await sql`call open_to_laboratory('formula_line', 'insert, update, delete')`.execute(db);
}
