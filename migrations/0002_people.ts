import { sql, type Kysely } from 'kysely';

// Purpose: clients, people with their roles, sessions, tokens and the limits on attempts.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table client (
			id uuid primary key,
			name text not null unique check (length(name) between 1 and 200),
			created_at timestamptz not null default now(),
			created_by uuid
		)`.execute(db);
	await sql`
		create table person (
			id uuid primary key,
			email text not null check (email = lower(email) and length(email) <= 254),
			name text not null check (length(name) between 1 and 200),
			password_hash text not null,
			locale text not null default 'en' check (locale in ('en')),
			decimal_sign text not null default '.' check (decimal_sign in ('.', ',')),
			single_keys boolean not null default true,
			disabled_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid,
			unique (email)
		)`.execute(db);
	await sql`
		create table membership (
			person_id uuid not null references person,
			role text not null check (role in ('officer', 'formulator', 'assessor', 'administrator', 'client')),
			client_id uuid references client,
			created_at timestamptz not null default now(),
			created_by uuid,
			primary key (person_id, role),
			check ((role = 'client') = (client_id is not null))
		)`.execute(db);
	// One person may hold several staff roles, never a staff and a client role.
	await sql`
		create function refuse_mixed_membership() returns trigger language plpgsql as $$
		begin
			if exists (select 1 from membership m where m.person_id = new.person_id
				and (m.role = 'client') <> (new.role = 'client')) then
				raise exception 'a person is either staff or client' using errcode = 'check_violation';
			end if;
			return new;
		end $$`.execute(db);
	await sql`
		create trigger membership_on_one_side before insert or update on membership
			for each row execute function refuse_mixed_membership()`.execute(db);
	await sql`
		create table session (
			id_hash text primary key check (length(id_hash) = 64),
			person_id uuid not null references person,
			expires_at timestamptz not null,
			last_seen_at timestamptz not null default now(),
			created_at timestamptz not null default now()
		)`.execute(db);
	await sql`create index session_person on session (person_id)`.execute(db);
	await sql`create index session_expiry on session (expires_at)`.execute(db);
	await sql`
		create table api_token (
			id uuid primary key,
			secret_hash text not null unique,
			person_id uuid not null references person,
			scopes text[] not null,
			expires_at timestamptz not null,
			revoked_at timestamptz,
			created_at timestamptz not null default now()
		)`.execute(db);
	await sql`create index api_token_person on api_token (person_id)`.execute(db);
	await sql`
		create table attempt (
			key text not null check (length(key) <= 200),
			window_start timestamptz not null,
			count integer not null,
			primary key (key, window_start)
		)`.execute(db);
	for (const table of ['person', 'membership', 'session', 'api_token', 'attempt', 'client']) {
		await sql`grant select, insert, update on ${sql.table(table)} to costmary_application`.execute(db);
	}
	for (const table of ['session', 'attempt']) {
		await sql`grant delete on ${sql.table(table)} to costmary_application`.execute(db);
	}
	// A client may learn its own name only; sign-in and the worker act as the system.
	await sql`alter table client enable row level security`.execute(db);
	await sql`
		create policy own_client on client using (
			acting_side() in ('staff', 'system') or (acting_side() = 'client' and id = acting_client()))`.execute(db);
}
