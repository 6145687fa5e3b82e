import { sql, type Kysely } from 'kysely';

// Purpose: the audit trail, one hash chain per stream, which the application may extend and never edit.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table audit_stream (
			id uuid primary key,
			kind text not null check (kind in ('workspace', 'material', 'formula', 'product')),
			subject_id uuid not null,
			head_seq bigint not null default 0,
			head_hash text not null default '',
			unique (kind, subject_id)
		)`.execute(db);
	await sql`
		create table audit_row (
			stream_id uuid not null references audit_stream,
			seq bigint not null,
			at timestamptz(3) not null,
			actor_id uuid,
			action text not null,
			subject text not null,
			before jsonb,
			after jsonb,
			reason text,
			prev_hash text not null,
			hash text not null,
			primary key (stream_id, seq)
		)`.execute(db);
	await sql`
		create table audit_checkpoint (
			at timestamptz(3) primary key,
			heads_hash text not null
		)`.execute(db);
	await sql`grant select, insert, update on audit_stream to costmary_application`.execute(db);
	await sql`grant select, insert on audit_row to costmary_application`.execute(db);
	await sql`grant select, insert on audit_checkpoint to costmary_application`.execute(db);
	await sql`alter table audit_stream enable row level security`.execute(db);
	await sql`create policy any_actor on audit_stream using (acting_side() is not null)`.execute(db);
	await sql`alter table audit_row enable row level security`.execute(db);
	await sql`create policy staff_reads on audit_row for select using (acting_side() in ('staff', 'system'))`.execute(db);
	await sql`create policy any_actor_adds on audit_row for insert with check (acting_side() is not null)`.execute(db);
}
