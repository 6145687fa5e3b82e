import { sql, type Kysely } from 'kysely';

// Purpose: one-time links for invitations and new passwords, and the outbox that mails leave from.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table one_time_link (
			id uuid primary key,
			secret_hash text not null unique check (length(secret_hash) = 64),
			purpose text not null check (purpose in ('invitation', 'reset')),
			person_id uuid not null references person,
			expires_at timestamptz not null,
			used_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid references person
		)`.execute(db);
	await sql`create index one_time_link_person on one_time_link (person_id)`.execute(db);
	await sql`
		create table outbox_mail (
			id uuid primary key,
			message_id text not null unique,
			to_address text not null check (length(to_address) between 3 and 254),
			template text not null check (template in ('invitation', 'reset', 'passwordChanged')),
			data jsonb not null,
			state text not null default 'waiting' check (state in ('waiting', 'sent')),
			sent_at timestamptz,
			created_at timestamptz not null default now(),
			check ((state = 'sent') = (sent_at is not null))
		)`.execute(db);
	for (const table of ['one_time_link', 'outbox_mail']) {
		await sql`grant select, insert, update on ${sql.table(table)} to costmary_application`.execute(db);
	}
}
