import { sql, type Kysely } from 'kysely';

// Purpose: what a supplier has answered about a material, question by question, and the limits of use that documents set.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table material_answer (
			id uuid primary key,
			material_id uuid not null references material,
			version_number integer not null check (version_number > 0),
			question text not null check (question in
				('composition', 'allergens', 'impurities', 'heavyMetals', 'animalOrigin', 'nano', 'cmr', 'animalTesting', 'perfumeLimits')),
			answer text not null check (answer in ('complete', 'absent', 'present', 'withdrawn')),
			law text check (law in ('before-2023-1545', '2023-1545')),
			quantified_from text check (length(quantified_from) between 1 and 200),
			document_id uuid references document,
			dated date,
			good_until date,
			remark text not null default '' check (length(remark) <= 500),
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			check ((answer = 'withdrawn') = (document_id is null)),
			check (question = 'allergens' or law is null)
		)`.execute(db);
	await sql`create index material_answer_standing on material_answer (material_id, question, created_at desc)`.execute(
		db
	);
	await sql`create index material_answer_document on material_answer (document_id)`.execute(db);
	await sql`
		create table use_limit (
			id uuid primary key,
			material_id uuid not null references material,
			kind text not null check (kind in
				('perfumeCategory', 'supplierMaximum', 'phWindow', 'heatLimit', 'shearLimit')),
			category text check (length(category) between 1 and 40),
			low numeric(11, 6) check (low >= 0),
			high numeric(11, 6) check (high >= 0),
			document_id uuid not null references document,
			page integer check (page > 0),
			withdrawn_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			check (low is not null or high is not null),
			check (low is null or high is null or kind = 'shearLimit' or low <= high),
			check ((kind = 'perfumeCategory') = (category is not null))
		)`.execute(db);
	await sql`create index use_limit_material on use_limit (material_id) where withdrawn_at is null`.execute(db);
	await sql`call open_to_laboratory('material_answer', 'insert')`.execute(db);
	await sql`call open_to_laboratory('use_limit', 'insert, update')`.execute(db);
}
