import { sql, type Kysely } from 'kysely';

// Purpose: files by content, uploads under way, documents and what they are evidence for.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table file_object (
			sha256 text primary key check (length(sha256) = 64),
			bytes bigint not null check (bytes > 0),
			media_type text not null,
			pages integer,
			encrypted boolean not null default false,
			broken boolean not null default false,
			stored_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`
		create table upload (
			id uuid primary key,
			person_id uuid not null references person,
			purpose text not null,
			name text not null check (length(name) between 1 and 255),
			expected_bytes bigint not null check (expected_bytes > 0),
			s3_upload_id text not null,
			state text not null check (state in ('receiving', 'completing', 'done', 'abandoned')),
			parts jsonb not null default '[]',
			sha256 text references file_object,
			expires_at timestamptz not null,
			created_at timestamptz not null default now()
		)`.execute(db);
	await sql`create index upload_expiry on upload (expires_at) where state in ('receiving', 'completing')`.execute(db);
	await sql`
		create table document (
			id uuid primary key,
			client_id uuid references client,
			kind text not null,
			title text not null check (length(title) between 1 and 300),
			file_name text not null check (length(file_name) between 1 and 255),
			sha256 text not null references file_object,
			dated date,
			expires date,
			supersedes_id uuid references document,
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`create index document_title on document using gin (title gin_trgm_ops)`.execute(db);
	await sql`create index document_file on document (sha256)`.execute(db);
	await sql`
		create table document_link (
			id uuid primary key,
			document_id uuid not null references document,
			subject_kind text not null check (subject_kind in ('material', 'product', 'formula')),
			subject_id uuid not null,
			need text,
			formula_version_id uuid,
			withdrawn_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid not null references person
		)`.execute(db);
	await sql`create index document_link_subject on document_link (subject_kind, subject_id)`.execute(db);
	await sql`create index document_link_document on document_link (document_id)`.execute(db);

	await sql`grant select, insert on file_object to costmary_application`.execute(db);
	await sql`alter table file_object enable row level security`.execute(db);
	await sql`create policy any_actor on file_object using (acting_side() is not null)`.execute(db);
	await sql`grant select, insert, update, delete on upload to costmary_application`.execute(db);
	await sql`alter table upload enable row level security`.execute(db);
	await sql`
		create policy own_upload on upload using (acting_side() = 'system' or person_id = acting_person())`.execute(db);
	await sql`grant select, insert on document to costmary_application`.execute(db);
	await sql`alter table document enable row level security`.execute(db);
	await sql`
		create policy staff_or_own on document using (
			acting_side() in ('staff', 'system') or (acting_side() = 'client' and client_id = acting_client()))`.execute(db);
	await sql`call open_to_laboratory('document_link', 'insert, update')`.execute(db);
}
