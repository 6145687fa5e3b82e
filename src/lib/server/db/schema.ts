import type { ColumnType, Generated, JSONColumnType } from 'kysely';
import type { AllergenLaw, Question } from '$lib/domain/material/questions';
import type { Answer, LimitKind } from '$lib/schemas/material-answers';
import type { Role } from '../access/actor';

/** Exact decimals and counts stay text from the database to the domain. */
export type Numeric = ColumnType<string, string, string>;
type NullableNumeric = ColumnType<string | null, string | null | undefined, string | null>;
export type Count = ColumnType<string, string | number | bigint, string | number | bigint>;
/** A calendar day, ISO. */
type Day = ColumnType<string | null, string | null | undefined, string | null>;
type At = ColumnType<Date, Date | string | undefined, Date | string>;
type NullableAt = ColumnType<Date | null, Date | string | null | undefined, Date | string | null>;
type Json<T> = ColumnType<T, string, string>;
type NullableJson<T> = ColumnType<T | null, string | null | undefined, string | null>;
type Made = { created_at: Generated<Date>; created_by: string };

export type CopyState =
	'draft' | 'inReview' | 'sentBack' | 'approvedByLaboratory' | 'approvedByClient' | 'inUse' | 'superseded';
export type Market = 'EU' | 'GB' | 'US' | 'CA' | 'AU' | 'ASEAN' | 'CH';
export type SubstanceUse = 'colourant' | 'uvFilter' | 'hairDye' | 'preservative' | 'other';
export type PartRole = 'ingredient' | 'carryOver' | 'impurity' | 'processingAid';
export type Origin = 'plant' | 'animal' | 'mineral' | 'synthetic' | 'biotechnological' | 'mixed';
export type ImportOutcome = 'faulty' | 'newMaterial' | 'newVersion' | 'unchanged';
export type ImportState = 'reading' | 'unreadable' | 'judged' | 'committing' | 'committed' | 'discarded';
export type Criterion =
	'legalCompliance' | 'truthfulness' | 'evidentialSupport' | 'honesty' | 'fairness' | 'informedDecision';

interface ClientTable {
	id: string;
	name: string;
	created_at: Generated<Date>;
	created_by: string | null;
}
interface PersonTable {
	id: string;
	email: string;
	name: string;
	password_hash: string;
	locale: Generated<'en'>;
	decimal_sign: Generated<'.' | ','>;
	single_keys: Generated<boolean>;
	disabled_at: NullableAt;
	created_at: Generated<Date>;
	created_by: string | null;
}
interface OneTimeLinkTable {
	id: string;
	secret_hash: string;
	purpose: 'invitation' | 'reset';
	person_id: string;
	expires_at: Date;
	used_at: NullableAt;
	created_at: Generated<Date>;
	created_by: string | null;
}
interface OutboxMailTable {
	id: string;
	message_id: string;
	to_address: string;
	template: 'invitation' | 'reset' | 'passwordChanged';
	data: Json<object>;
	state: Generated<'waiting' | 'sent'>;
	sent_at: NullableAt;
	created_at: Generated<Date>;
}
interface MembershipTable {
	person_id: string;
	role: Role;
	client_id: string | null;
	created_at: Generated<Date>;
	created_by: string | null;
}
interface SessionTable {
	id_hash: string;
	person_id: string;
	expires_at: At;
	last_seen_at: Generated<Date>;
	created_at: Generated<Date>;
}
interface ApiTokenTable {
	id: string;
	secret_hash: string;
	person_id: string;
	scopes: string[];
	expires_at: At;
	revoked_at: NullableAt;
	created_at: Generated<Date>;
}
interface AttemptTable {
	key: string;
	window_start: At;
	count: number;
}
export type StreamKind = 'workspace' | 'material' | 'formula' | 'product';
interface AuditStreamTable {
	id: string;
	kind: StreamKind;
	subject_id: string;
	head_seq: ColumnType<string, string | number | bigint | undefined, string | number | bigint>;
	head_hash: Generated<string>;
}
interface AuditRowTable {
	stream_id: string;
	seq: Count;
	at: At;
	actor_id: string | null;
	action: string;
	subject: string;
	before: NullableJson<unknown>;
	after: NullableJson<unknown>;
	reason: string | null;
	prev_hash: string;
	hash: string;
}
interface AuditCheckpointTable {
	at: At;
	heads_hash: string;
}
interface FileObjectTable {
	sha256: string;
	bytes: Count;
	media_type: string;
	pages: number | null;
	encrypted: Generated<boolean>;
	broken: Generated<boolean>;
	stored_at: Generated<Date>;
	created_by: string;
}
export interface UploadPart {
	readonly number: number;
	readonly etag: string;
	readonly bytes: number;
}
interface UploadTable {
	id: string;
	person_id: string;
	purpose: string;
	name: string;
	expected_bytes: Count;
	s3_upload_id: string;
	state: 'receiving' | 'completing' | 'done' | 'abandoned';
	parts: ColumnType<UploadPart[], string | undefined, string>;
	sha256: string | null;
	expires_at: At;
	created_at: Generated<Date>;
}
interface DocumentTable extends Made {
	id: string;
	client_id: string | null;
	kind: string;
	title: string;
	file_name: string;
	sha256: string;
	dated: Day;
	expires: Day;
	supersedes_id: string | null;
}
interface DocumentLinkTable extends Made {
	id: string;
	document_id: string;
	subject_kind: 'material' | 'product' | 'formula';
	subject_id: string;
	need: string | null;
	formula_version_id: string | null;
	withdrawn_at: NullableAt;
}
interface SupplierTable extends Made {
	id: string;
	name: string;
}
interface SubstanceTable {
	id: string;
	inci: string;
	name_key: string;
	cas: Generated<string[]>;
	ec: Generated<string[]>;
	colour_index: string | null;
	function: string | null;
	known: Generated<boolean>;
	created_at: Generated<Date>;
	created_by: string | null;
}
interface MaterialTable extends Made {
	id: string;
	code: string;
	trade_name: string;
	supplier_id: string;
	rev: Generated<number>;
}
interface VersionColumns extends Made {
	id: string;
	number: number;
	state: 'draft' | 'released';
	rev: Generated<number>;
	content_hash: string | null;
	released_at: NullableAt;
	released_by: string | null;
}
interface MaterialVersionTable extends VersionColumns {
	material_id: string;
	effective_from: Day;
}
interface ConstituentTable {
	id: string;
	material_version_id: string;
	position: number;
	substance_id: string;
	place: 'inSum' | 'ofWhich';
	role: PartRole | null;
	parent_id: string | null;
	use: Generated<SubstanceUse>;
	nano: Generated<boolean>;
	low: NullableNumeric;
	typical: NullableNumeric;
	high: NullableNumeric;
	high_open: Generated<boolean>;
	cas: string | null;
	ec: string | null;
	source_document_id: string | null;
	source_page: number | null;
	origin: Generated<Origin | null>;
}
interface MaterialAnswerTable extends Made {
	id: string;
	material_id: string;
	version_number: number;
	question: Question;
	answer: Answer;
	law: AllergenLaw | null;
	quantified_from: string | null;
	document_id: string | null;
	dated: Day;
	good_until: Day;
	remark: Generated<string>;
}
interface UseLimitTable extends Made {
	id: string;
	material_id: string;
	kind: LimitKind;
	category: string | null;
	low: NullableNumeric;
	high: NullableNumeric;
	document_id: string;
	page: number | null;
	withdrawn_at: NullableAt;
}
interface MaterialVersionDueTable {
	material_version_id: string;
	due: ColumnType<string, string, string>;
	person_id: string;
	created_at: Generated<Date>;
}
interface MaterialImportTable extends Made {
	id: string;
	document_id: string;
	file_name: string;
	state: ImportState;
	problem: NullableJson<object>;
	ignored_columns: Generated<string[]>;
	total_rows: Generated<number>;
	faulty_rows: Generated<number>;
	new_materials: Generated<number>;
	new_versions: Generated<number>;
	unchanged: Generated<number>;
	release: Generated<boolean>;
	effective_from: Day;
	job_id: string | null;
	committed_at: NullableAt;
}
interface MaterialImportRowTable {
	import_id: string;
	number: number;
	code: string;
	cells: Json<Readonly<Record<string, string>>>;
	faults: Json<readonly object[]>;
	faulty: Generated<boolean>;
	outcome: ImportOutcome;
}
interface FormulaTable extends Made {
	id: string;
	code: string;
	name: string;
	rev: Generated<number>;
}
interface FormulaVersionTable extends VersionColumns {
	formula_id: string;
}
interface FormulaLineTable {
	id: string;
	formula_version_id: string;
	position: number;
	phase: Generated<string>;
	material_id: string | null;
	formula_id: string | null;
	pinned_version_id: string | null;
	share_min: NullableNumeric;
	share: NullableNumeric;
	share_max: NullableNumeric;
	is_qs: Generated<boolean>;
	pin_reason: string | null;
}
interface TrialTable extends Made {
	id: string;
	formula_id: string;
	number: number;
	lines: Json<readonly object[]>;
	made_on: Day;
	ph: NullableNumeric;
	viscosity: NullableNumeric;
	verdict: 'good' | 'nearly' | 'no';
	remark: Generated<string>;
	picture_id: string | null;
}
interface ProductTable extends Made {
	id: string;
	client_id: string;
	slug: string;
	name: string;
	brand_name: string;
	function_text: Generated<string>;
	product_type: string;
	stay: 'leave-on' | 'rinse-off';
	sites: Generated<string[]>;
	ages: Generated<string[]>;
	spray: Generated<'none' | 'pump' | 'aerosol'>;
	oral: Generated<boolean>;
	professional: Generated<boolean>;
	inputs_rev: ColumnType<string, string | number | undefined, string | number>;
	rev: Generated<number>;
}
interface ProductScope {
	product_id: string;
	client_id: string;
}
interface ProductFormulaTable extends ProductScope, Made {
	formula_id: string;
	pinned_version_id: string | null;
	pin_reason: string | null;
	client_code: string | null;
}
interface ProductMarketTable extends ProductScope {
	market: Market;
	responsible_name: Generated<string>;
	responsible_address: Generated<string>;
	origin_country: Generated<string>;
}
interface ProductAssessorTable extends ProductScope, Made {
	person_id: string;
}
interface PackTable extends ProductScope, Made {
	id: string;
	name: string;
	size: Numeric;
	unit: 'ml' | 'g';
	gtin: string | null;
	rev: Generated<number>;
}
interface ProjectionTable extends ProductScope {
	kind: string;
	subject: string;
	fn_rev: number;
	inputs_rev: Count;
	hash: string;
	text: string;
	stamped_at: Generated<Date>;
}
interface StatementTable extends ProductScope {
	id: string;
	kind: 'list' | 'copy' | 'finding' | 'margin' | 'claim' | 'section' | 'signature';
	subject: string;
	text_hash: string;
	by_person: string;
	at: Generated<Date>;
	why: string | null;
	replaces_id: string | null;
}
interface StatementRestsTable extends ProductScope {
	statement_id: string;
	projection_kind: string;
	projection_subject: string;
	projection_rev: number;
	hash: string;
}
interface CounterTable {
	scope: string;
	next: Generated<number>;
}
interface LabelCopyTable extends ProductScope, Made {
	id: string;
	pack_id: string;
	market: Market;
	languages: Generated<string[]>;
	number: number | null;
	state: CopyState;
	content: Json<unknown>;
	content_hash: string | null;
	formula_version_id: string | null;
	basis: NullableJson<unknown>;
	batch_day: Day;
	list_statement_id: string | null;
	first_batch: string | null;
	last_batch: string | null;
	replaces_id: string | null;
	rev: Generated<number>;
}
interface LabelApprovalTable extends ProductScope {
	id: string;
	copy_id: string;
	as_role: 'officer' | 'client';
	person_id: string;
	decision: 'approved' | 'sentBack';
	comment: string | null;
	content_hash: string;
	at: Generated<Date>;
}
interface CopyEffectTable extends ProductScope {
	id: string;
	copy_id: string;
	effect: 'saysSomethingElse' | 'untouched';
	cause_kind: 'formula' | 'material' | 'product';
	cause_version_id: string;
	cause: string;
	old_text: string;
	new_text: string;
	at: Generated<Date>;
}
interface ArrangementTable extends ProductScope, Made {
	id: string;
	market: Market;
	ordering: Json<readonly string[]>;
}
interface CarryOverDecisionTable extends ProductScope, Made {
	id: string;
	substance_id: string;
	material_id: string;
	left_out: boolean;
	reason: string;
}
interface ClaimTable extends ProductScope, Made {
	id: string;
	market: Market;
	language: Generated<string>;
	wording: string;
	kind: string;
	withdrawn_at: NullableAt;
	rev: Generated<number>;
}
interface ClaimCriterionTable extends ProductScope {
	claim_id: string;
	criterion: Criterion;
	answer: string;
	by_person: string;
	at: Generated<Date>;
	rev: Generated<number>;
}
interface ClaimEvidenceTable extends ProductScope, Made {
	id: string;
	claim_id: string;
	document_id: string;
	formula_version_id: string | null;
	withdrawn_at: NullableAt;
}
interface NeedDecisionTable extends ProductScope {
	id: string;
	need: string;
	applicable: boolean;
	reason: string;
	by_person: string;
	at: Generated<Date>;
}
interface ProductFileTable extends ProductScope {
	id: string;
	number: number;
	formula_version_id: string;
	data_hash: string;
	open_needs: number;
	requested_by: string;
	requested_at: Generated<Date>;
}
interface ProductFileContentTable {
	product_file_id: string;
	data: JSONColumnType<object>;
}
interface ProductFileBuiltTable extends ProductScope {
	product_file_id: string;
	sha256: string;
	pages: number;
	built_at: Generated<Date>;
}
interface ProductFileShareTable extends ProductScope {
	id: string;
	product_file_id: string;
	why: string;
	by_person: string;
	at: Generated<Date>;
}
interface JobProgressTable {
	job_id: string;
	kind: string;
	subject: string;
	person_id: string;
	state: 'queued' | 'running' | 'done' | 'failed';
	done: Generated<number>;
	total: Generated<number>;
	note: Generated<string>;
	result_subject: string | null;
	created_at: Generated<Date>;
	updated_at: Generated<Date>;
}

export interface Database {
	client: ClientTable;
	person: PersonTable;
	membership: MembershipTable;
	one_time_link: OneTimeLinkTable;
	outbox_mail: OutboxMailTable;
	session: SessionTable;
	api_token: ApiTokenTable;
	attempt: AttemptTable;
	audit_stream: AuditStreamTable;
	audit_row: AuditRowTable;
	audit_checkpoint: AuditCheckpointTable;
	file_object: FileObjectTable;
	upload: UploadTable;
	document: DocumentTable;
	document_link: DocumentLinkTable;
	supplier: SupplierTable;
	substance: SubstanceTable;
	material: MaterialTable;
	material_version: MaterialVersionTable;
	constituent: ConstituentTable;
	material_answer: MaterialAnswerTable;
	use_limit: UseLimitTable;
	material_version_due: MaterialVersionDueTable;
	material_import: MaterialImportTable;
	material_import_row: MaterialImportRowTable;
	formula: FormulaTable;
	formula_version: FormulaVersionTable;
	formula_line: FormulaLineTable;
	trial: TrialTable;
	product: ProductTable;
	product_formula: ProductFormulaTable;
	product_market: ProductMarketTable;
	product_assessor: ProductAssessorTable;
	pack: PackTable;
	projection: ProjectionTable;
	statement: StatementTable;
	statement_rests: StatementRestsTable;
	counter: CounterTable;
	label_copy: LabelCopyTable;
	label_approval: LabelApprovalTable;
	copy_effect: CopyEffectTable;
	arrangement: ArrangementTable;
	carry_over_decision: CarryOverDecisionTable;
	claim: ClaimTable;
	claim_criterion: ClaimCriterionTable;
	claim_evidence: ClaimEvidenceTable;
	need_decision: NeedDecisionTable;
	product_file: ProductFileTable;
	product_file_content: ProductFileContentTable;
	product_file_built: ProductFileBuiltTable;
	product_file_share: ProductFileShareTable;
	job_progress: JobProgressTable;
}
