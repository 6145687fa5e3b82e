import { sql, type Kysely } from 'kysely';

// Purpose: the officer's order of a list, justified carry-over, and effects on copies that a product's own change causes.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table arrangement (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			market text not null check (market in ('EU', 'GB', 'US', 'CA', 'AU', 'ASEAN', 'CH')),
			ordering jsonb not null check (jsonb_typeof(ordering) = 'array'),
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index arrangement_newest on arrangement (product_id, market, id desc)`.execute(db);
	await sql`
		create table carry_over_decision (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			substance_id uuid not null references substance,
			material_id uuid not null references material,
			left_out boolean not null,
			reason text not null check (length(reason) between 1 and 1000),
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create index carry_over_decision_newest
		on carry_over_decision (product_id, substance_id, material_id, id desc)`.execute(db);
	await sql`alter table copy_effect drop constraint copy_effect_cause_kind_check`.execute(db);
	await sql`
		alter table copy_effect add constraint copy_effect_cause_kind_check
		check (cause_kind in ('formula', 'material', 'product'))`.execute(db);
	await sql`call open_to_client('arrangement', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('carry_over_decision', 'product_id', 'insert')`.execute(db);
}
