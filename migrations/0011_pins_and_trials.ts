import { sql, type Kysely } from 'kysely';

// Purpose: why a formula line pins a version of its bulk, the function of a constituent in a formula, and trials.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`alter table formula_line add column pin_reason text check (length(pin_reason) between 1 and 500)`.execute(
		db
	);
	await sql`
		alter table formula_line add constraint formula_line_pin_has_reason
		check ((pinned_version_id is null) = (pin_reason is null))`.execute(db);
	await sql`
		create table trial (
			id uuid primary key,
			formula_id uuid not null references formula,
			number integer not null check (number > 0),
			lines jsonb not null check (jsonb_typeof(lines) = 'array'),
			made_on date not null,
			ph numeric(4, 2) check (ph between 0 and 14),
			viscosity numeric(12, 2) check (viscosity >= 0),
			verdict text not null check (verdict in ('good', 'nearly', 'no')),
			remark text not null default '' check (length(remark) <= 2000),
			picture_id uuid references document,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (formula_id, number)
		)`.execute(db);
	await sql`call open_to_laboratory('trial', 'insert')`.execute(db);
}
