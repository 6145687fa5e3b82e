import { sql, type Kysely } from 'kysely';

// Purpose: claims with their six criteria and evidence, decisions on the needs of the file, built files, job progress.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`
		create table claim (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			market text not null,
			language text not null default 'en',
			wording text not null check (length(wording) between 1 and 500),
			kind text not null,
			withdrawn_at timestamptz,
			rev integer not null default 1,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			unique (client_id, product_id, id),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index claim_product on claim (product_id)`.execute(db);
	await sql`
		create table claim_criterion (
			claim_id uuid not null,
			product_id uuid not null,
			client_id uuid not null,
			criterion text not null check (criterion in
				('legalCompliance', 'truthfulness', 'evidentialSupport', 'honesty', 'fairness', 'informedDecision')),
			answer text not null check (length(answer) between 1 and 4000),
			by_person uuid not null references person,
			at timestamptz not null default now(),
			rev integer not null default 1,
			primary key (claim_id, criterion),
			foreign key (client_id, product_id, claim_id) references claim (client_id, product_id, id)
		)`.execute(db);
	await sql`
		create table claim_evidence (
			id uuid primary key,
			claim_id uuid not null,
			product_id uuid not null,
			client_id uuid not null,
			document_id uuid not null references document,
			formula_version_id uuid references formula_version,
			withdrawn_at timestamptz,
			created_at timestamptz not null default now(),
			created_by uuid not null references person,
			foreign key (client_id, product_id, claim_id) references claim (client_id, product_id, id)
		)`.execute(db);
	await sql`create index claim_evidence_claim on claim_evidence (claim_id)`.execute(db);
	await sql`
		create table need_decision (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			need text not null,
			applicable boolean not null,
			reason text not null check (length(reason) between 1 and 2000),
			by_person uuid not null references person,
			at timestamptz not null default now(),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`create index need_decision_product on need_decision (product_id, need, at desc)`.execute(db);
	await sql`
		create table product_file (
			id uuid primary key,
			product_id uuid not null,
			client_id uuid not null,
			number integer not null,
			formula_version_id uuid not null references formula_version,
			data_hash text not null,
			open_needs integer not null,
			requested_by uuid not null references person,
			requested_at timestamptz not null default now(),
			unique (product_id, number),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	// The content names suppliers and quantities, which a client never reads, so it stands in a laboratory table.
	await sql`
		create table product_file_content (
			product_file_id uuid primary key references product_file,
			data jsonb not null
		)`.execute(db);
	await sql`
		create table product_file_built (
			product_file_id uuid primary key references product_file,
			product_id uuid not null,
			client_id uuid not null,
			sha256 text not null references file_object,
			pages integer not null,
			built_at timestamptz not null default now(),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create table product_file_share (
			id uuid primary key,
			product_file_id uuid not null references product_file,
			product_id uuid not null,
			client_id uuid not null,
			why text not null check (length(why) between 1 and 1000),
			by_person uuid not null references person,
			at timestamptz not null default now(),
			foreign key (client_id, product_id) references product (client_id, id)
		)`.execute(db);
	await sql`
		create table job_progress (
			job_id uuid primary key,
			kind text not null,
			subject text not null,
			person_id uuid not null references person,
			state text not null check (state in ('queued', 'running', 'done', 'failed')),
			done integer not null default 0,
			total integer not null default 0,
			note text not null default '',
			result_subject text,
			created_at timestamptz not null default now(),
			updated_at timestamptz not null default now()
		)`.execute(db);
	await sql`create index job_progress_person on job_progress (person_id, created_at desc)`.execute(db);
	await sql`create index job_progress_subject on job_progress (kind, subject)`.execute(db);

	await sql`call open_to_client('claim', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('claim_criterion', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('claim_evidence', 'product_id', 'insert, update')`.execute(db);
	await sql`call open_to_client('need_decision', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('product_file', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_laboratory('product_file_content', 'insert')`.execute(db);
	await sql`call open_to_client('product_file_built', 'product_id', 'insert')`.execute(db);
	await sql`call open_to_client('product_file_share', 'product_id', 'insert')`.execute(db);
	await sql`grant select, insert, update on job_progress to costmary_application`.execute(db);
	await sql`alter table job_progress enable row level security`.execute(db);
	await sql`
		create policy own_or_staff on job_progress using (
			acting_side() in ('staff', 'system') or person_id = acting_person())`.execute(db);
}
