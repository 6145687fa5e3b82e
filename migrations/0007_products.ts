import { sql, type Kysely } from 'kysely';

// Purpose: products of clients, the formula they refer to, their markets, packs and assessors.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table product (
			id uuid primary key,
			client_id uuid not null references client,
			slug text not null unique check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(slug) <= 80),
			name text not null check (length(name) between 1 and 200),
			brand_name text not null check (length(brand_name) between 1 and 200),
			function_text text not null default '',
			product_type text not null,
			stay text not null check (stay in ('leave-on', 'rinse-off')),
			sites text[] not null default '{}',
			ages text[] not null default '{adult}',
			spray text not null default 'none' check (spray in ('none', 'pump', 'aerosol')),
			oral boolean not null default false,
			professional boolean not null default false,
			inputs_rev bigint not null default 1,
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (client_id, id)
		)`.execute(db);
	await sql`create index product_client on product (client_id)`.execute(db);
	await sql`create index product_search on product using gin ((name || ' ' || brand_name) gin_trgm_ops)`.execute(db);
	await sql`
		create table product_formula (
			product_id uuid not null,
			client_id uuid not null,
			formula_id uuid not null references formula,
			pinned_version_id uuid references formula_version,
			pin_reason text,
			client_code text,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			primary key (product_id),
			foreign key (client_id, product_id) references product (client_id, id),
			check ((pinned_version_id is null) = (pin_reason is null))
		)`.execute(db);
	await sql`create index product_formula_formula on product_formula (formula_id)`.execute(db);
	await sql`
		create table product_market (
			product_id uuid not null,
			client_id uuid not null,
			market text not null check (market in ('EU', 'GB', 'US', 'CA', 'AU', 'ASEAN', 'CH')),
			responsible_name text not null default '',
			responsible_address text not null default '',
			origin_country text not null default '',
			primary key (product_id, market),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create table product_assessor (
			product_id uuid not null,
			client_id uuid not null,
			person_id uuid not null references person,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			primary key (product_id, person_id),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index product_assessor_person on product_assessor (person_id)`.execute(db);
	await sql`
		create table pack (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			name text not null check (length(name) between 1 and 120),
			size numeric(12, 3) not null check (size > 0),
			unit text not null check (unit in ('ml', 'g')),
			gtin text,
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (client_id, product_id, id),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index pack_product on pack (product_id)`.execute(db);
	await sql`call open_to_client('product', 'id', 'insert, update')`.execute(db);
	await sql`call open_to_client('product_formula', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('product_market', 'product_id', 'insert, update, delete')`.execute(db);
	await sql`call open_to_client('product_assessor', 'product_id', 'insert, delete')`.execute(db);
	await sql`call open_to_client('pack', 'product_id', 'insert, update')`.execute(db);
}
