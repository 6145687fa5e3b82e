import { sql, type Kysely } from 'kysely';

// Purpose: statements with the projections they rest on, label copies through their states, and gapless numbers.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table projection (
			product_id uuid not null,
			client_id uuid not null,
			kind text not null,
			subject text not null,
			fn_rev integer not null,
			inputs_rev bigint not null,
			hash text not null check (length(hash) = 64),
			text text not null,
			stamped_at timestamptz not null default now(),
			primary key (product_id, kind, subject),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create table statement (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			kind text not null check (kind in ('list', 'copy', 'finding', 'margin', 'claim', 'section', 'signature')),
			subject text not null,
			text_hash text not null check (length(text_hash) = 64),
			by_person uuid not null references person,
			at timestamptz not null default now(),
			why text,
			replaces_id uuid references statement,
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index statement_product on statement (product_id)`.execute(db);
	await sql`
		create table statement_rests (
			statement_id uuid not null references statement,
			product_id uuid not null,
			client_id uuid not null,
			projection_kind text not null,
			projection_subject text not null,
			projection_rev integer not null,
			hash text not null check (length(hash) = 64),
			primary key (statement_id, projection_kind, projection_subject),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create index statement_rests_projection on statement_rests (product_id, projection_kind, projection_subject)`.execute(
		db
	);
	await sql`create table counter (scope text primary key, next integer not null default 1 check (next > 0))`.execute(
		db
	);
	await sql`
		create table label_copy (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			pack_id uuid not null,
			market text not null,
			languages text[] not null default '{en}',
			number integer,
			state text not null check (state in
				('draft', 'inReview', 'sentBack', 'approvedByLaboratory', 'approvedByClient', 'inUse', 'superseded')),
			content jsonb not null,
			content_hash text,
			formula_version_id uuid references formula_version,
			basis jsonb,
			batch_day date,
			list_statement_id uuid references statement,
			first_batch text check (length(first_batch) between 1 and 60),
			last_batch text,
			replaces_id uuid references label_copy,
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			foreign key (client_id, product_id) references product (client_id, id),
			foreign key (client_id, product_id, pack_id) references pack (client_id, product_id, id),
			unique (product_id, number),
			check (state = 'draft' or (content_hash is not null and list_statement_id is not null)),
			check ((number is null) = (state in ('draft', 'inReview')) or state = 'sentBack'),
			check (state not in ('inUse', 'superseded') or first_batch is not null)
		)`.execute(db);
	await sql`create index label_copy_product on label_copy (product_id, state)`.execute(db);
	await sql`
		create unique index one_draft_per_pack_and_market on label_copy (pack_id, market) where state = 'draft'`.execute(db);
	await sql`
		create unique index one_in_use_per_pack_and_market on label_copy (pack_id, market) where state = 'inUse'`.execute(db);
	// From review on the text is frozen: only the state, the number it takes and the batches it was used for move on.
	await sql`
		create function refuse_change_of_frozen_copy() returns trigger language plpgsql as $$
		begin
			if old.state = 'draft' then return new; end if;
			if new.state = 'draft' or (to_jsonb(new) - array['state', 'number', 'first_batch', 'last_batch', 'rev'])
				<> (to_jsonb(old) - array['state', 'number', 'first_batch', 'last_batch', 'rev'])
				or (old.number is not null and new.number is distinct from old.number)
				or (old.first_batch is not null and new.first_batch is distinct from old.first_batch)
				or (old.last_batch is not null and new.last_batch is distinct from old.last_batch) then
				raise exception 'copy % is frozen', old.id using errcode = 'check_violation';
			end if;
			return new;
		end $$`.execute(db);
	await sql`
		create trigger label_copy_frozen before update on label_copy
			for each row execute function refuse_change_of_frozen_copy()`.execute(db);
	await sql`
		create table label_approval (
			id uuid primary key,
			copy_id uuid not null references label_copy,
			product_id uuid not null,
			client_id uuid not null,
			as_role text not null check (as_role in ('officer', 'client')),
			person_id uuid not null references person,
			decision text not null check (decision in ('approved', 'sentBack')),
			comment text,
			content_hash text not null,
			at timestamptz not null default now(),
			foreign key (client_id, product_id) references product (client_id, id),
			check (decision <> 'sentBack' or length(comment) > 0)
		)`.execute(db);
	await sql`create index label_approval_copy on label_approval (copy_id)`.execute(db);
	// What a released version did to a copy: the proof of "untouched" stands beside every "says something else".
	await sql`
		create table copy_effect (
			id uuid primary key,
			copy_id uuid not null references label_copy,
			product_id uuid not null,
			client_id uuid not null,
			effect text not null check (effect in ('saysSomethingElse', 'untouched')),
			cause_kind text not null check (cause_kind in ('formula', 'material')),
			cause_version_id uuid not null,
			cause text not null,
			old_text text not null,
			new_text text not null,
			at timestamptz not null default now(),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index copy_effect_copy on copy_effect (copy_id, at)`.execute(db);
	await sql`create index copy_effect_cause on copy_effect (cause_version_id)`.execute(db);

	await sql`call open_to_client('projection', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('statement', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('statement_rests', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('label_copy', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('label_approval', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('copy_effect', 'product_id', 'insert')`.execute(db);
	await sql`grant select, insert, update on counter to costmary_application`.execute(db);
	await sql`alter table counter enable row level security`.execute(db);
	await sql`create policy any_actor on counter using (acting_side() is not null)`.execute(db);
}
