import { sql, type Kysely } from 'kysely';

// Purpose: material versions that are released for a day to come; what they move is worked out when the day is there.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table material_version_due (
			material_version_id uuid primary key references material_version,
			due date not null,
			person_id uuid not null references person,
			created_at timestamptz not null default now()
		)`.execute(db);
	await sql`create index material_version_due_day on material_version_due (due)`.execute(db);
	await sql`call open_to_laboratory('material_version_due', 'insert, update, delete')`.execute(db);
}
