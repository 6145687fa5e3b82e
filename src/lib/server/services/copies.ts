import { canonicalCopy } from '$lib/domain/label/forms';
import type { CopyJudgement, LabelContent } from '$lib/domain/label/types';
import { RULE_BOOK_NAME } from '$lib/reference';
import type { CopyDraft, FirstBatch } from '$lib/schemas/label-copy';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { basesOf, copiesOf, lockCopy, lockProduct, takeNumber, type CopyRow } from '../db/copies';
import { newId } from '../db/id';
import { marketsOf, packsOf, productBySlug, type ProductRow } from '../db/products';
import type { CopyState, Market } from '../db/schema';
import { withActor, type Trx } from '../db/with-actor';
import { sha256 } from '../hash';
import { Refused } from '../refused';
import { draftContent, editedContent } from './copy-content';
import { judge, standingOf } from './copy-standing';
import { stampProduct } from './moves';
import { readProduct, type HashedProjection, type Reading } from './readings';

type Read = Extract<Reading, { kind: 'reading' }>;

/** A new copy waits until these are settled: two texts on their way for one pack would race each other to print. */
const UNSETTLED: readonly CopyState[] = ['draft', 'inReview', 'approvedByLaboratory'];
/** The only market whose list is computed so far. */
const LISTED: Market = 'EU';

interface Step {
	readonly action: string;
	readonly before?: unknown;
	readonly after?: unknown;
	readonly reason?: string | null;
}
const record = (trx: Trx, actor: Actor, copy: Pick<CopyRow, 'id' | 'productId'>, step: Step) =>
	audit(trx, actor, {
		stream: { kind: 'product', id: copy.productId },
		subject: `label-copy/${copy.id}`,
		...step
	});

function requireState(copy: CopyRow, ...states: readonly CopyState[]): void {
	if (!states.includes(copy.state)) throw new Refused('wrong-state', { state: copy.state, needed: states });
}

/** Approval is never given to a text that its own reasons no longer carry. */
function requireTrue(copy: CopyRow): void {
	if (copy.beingRechecked) throw new Refused('blocked', { faults: [{ kind: 'beingRechecked' }] });
	if (copy.outOfDate) throw new Refused('blocked', { faults: [{ kind: 'outOfDate' }] });
}

function requireSound({ faults, questions }: CopyJudgement, reason: string): void {
	if (faults.length > 0) throw new Refused('blocked', { faults });
	if (questions.length > 0 && reason === '') throw new Refused('blocked', { questions });
}

const copyOf = async (trx: Trx, slug: string, id: string): Promise<CopyRow> =>
	lockCopy(trx, (await productBySlug(trx, slug)).id, id);

/**
 * Begins a copy of a pack for a market: with the words of the newest copy, else of the product.
 * @throws Refused 'invalid' for a pack or market that the product has not; 'exists' while another is on its way.
 */
export function createCopy(actor: Actor, slug: string, packId: string, market: string): Promise<string> {
	requireAct(actor, 'editCopy');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		await lockProduct(trx, product.id);
		const pack = (await packsOf(trx, product.id)).find(({ id }) => id === packId);
		if (!pack) throw new Refused('invalid', { field: 'packId', value: packId });
		const place = (await marketsOf(trx, product.id)).find((each) => each.market === market);
		if (!place || market !== LISTED) throw new Refused('invalid', { field: 'market', value: market });
		const earlier = (await copiesOf(trx, product.id)).filter(
			(copy) => copy.packId === packId && copy.market === market
		);
		const open = earlier.find(({ state }) => UNSETTLED.includes(state));
		if (open) throw new Refused('exists', { copyId: open.id, state: open.state });
		const content = draftContent(product, pack, place, earlier[0]?.content ?? null);
		return insertDraft(trx, actor, product, { packId, market: LISTED, content, replacesId: earlier[0]?.id ?? null });
	});
}

interface NewDraft {
	readonly packId: string;
	readonly market: Market;
	readonly content: LabelContent;
	readonly replacesId: string | null;
}

async function insertDraft(
	trx: Trx,
	actor: Actor,
	product: { readonly id: string; readonly clientId: string },
	draft: NewDraft
): Promise<string> {
	const id = newId();
	await trx
		.insertInto('label_copy')
		.values({
			id,
			product_id: product.id,
			client_id: product.clientId,
			pack_id: draft.packId,
			market: draft.market,
			state: 'draft',
			content: JSON.stringify(draft.content),
			replaces_id: draft.replacesId,
			created_by: actor.personId
		})
		.execute();
	await record(trx, actor, { id, productId: product.id }, { action: 'copy-begun', after: draft });
	return id;
}

/** Saves a draft's words and gives its next revision. @throws Refused 'conflict' with what stands there now. */
export function saveCopy(actor: Actor, slug: string, id: string, draft: CopyDraft): Promise<number> {
	requireAct(actor, 'editCopy');
	return withActor(actor, async (trx) => {
		const copy = await copyOf(trx, slug, id);
		requireState(copy, 'draft');
		if (copy.rev !== draft.rev) throw new Refused('conflict', { rev: copy.rev, theirs: copy.content });
		const content = editedContent(copy.content, draft);
		await trx
			.updateTable('label_copy')
			.set({ content: JSON.stringify(content), rev: copy.rev + 1 })
			.where('id', '=', id)
			.execute();
		await record(trx, actor, copy, { action: 'copy-saved', before: copy.content, after: content });
		return copy.rev + 1;
	});
}

/**
 * Puts a draft into review: its words and the list are frozen and hashed, and the list becomes a statement that rests on the
 * projection of today.
 * @throws Refused 'wrong-state'; 'blocked' with the faults, or with the questions when no reason is given.
 */
export function submitCopy(actor: Actor, slug: string, id: string, reason: string): Promise<void> {
	requireAct(actor, 'submitCopy');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const copy = await lockCopy(trx, product.id, id);
		requireState(copy, 'draft');
		if (copy.beingRechecked) throw new Refused('blocked', { faults: [{ kind: 'beingRechecked' }] });
		const { reading, projection } = await stampProduct(trx, product, today());
		const judgement = judge(copy.content, standingOf(reading, false));
		requireSound(judgement, reason);
		// Nothing refused the copy, so there is a list.
		if (reading.kind !== 'reading') throw new Refused('blocked', { faults: [{ kind: 'nothingReleased' }] });
		await freeze(trx, actor, product, copy, { reading, projection, judgement, reason });
	});
}

interface Grounds {
	readonly reading: Read;
	readonly projection: HashedProjection;
	readonly judgement: CopyJudgement;
	readonly reason: string;
}

async function freeze(trx: Trx, actor: Actor, product: ProductRow, copy: CopyRow, grounds: Grounds): Promise<void> {
	const { list, basis } = grounds.reading;
	const content: LabelContent = { ...copy.content, ingredients: list.text };
	const contentHash = sha256(canonicalCopy(content));
	const statementId = await stateList(trx, actor, product, grounds);
	const bases = await basesOf(trx, product.id);
	const known = bases.indexOf(basis.hash);
	await trx
		.updateTable('label_copy')
		.set({
			state: 'inReview',
			content: JSON.stringify(content),
			content_hash: contentHash,
			formula_version_id: basis.formulaVersion.id,
			batch_day: basis.batchDay,
			list_statement_id: statementId,
			basis: JSON.stringify({
				formulaCode: product.formulaCode,
				formulaNumber: basis.formulaVersion.number,
				releasedOn: basis.formulaVersion.releasedAt.toISOString().slice(0, 10),
				number: known < 0 ? bases.length + 1 : known + 1,
				hash: basis.hash,
				ruleBook: RULE_BOOK_NAME,
				asked: grounds.judgement.questions.map(({ name }) => name)
			})
		})
		.where('id', '=', copy.id)
		.execute();
	await record(trx, actor, copy, {
		action: 'copy-submitted',
		after: {
			contentHash,
			formulaVersion: basis.formulaVersion.id,
			basis: basis.hash,
			questions: grounds.judgement.questions
		},
		reason: grounds.reason || null
	});
}

async function stateList(trx: Trx, actor: Actor, product: ProductRow, grounds: Grounds): Promise<string> {
	const id = newId();
	const scope = { product_id: product.id, client_id: product.clientId };
	const { projection, reading, reason } = grounds;
	await trx
		.insertInto('statement')
		.values({
			id,
			...scope,
			kind: 'list',
			subject: projection.subject,
			text_hash: sha256(reading.list.text),
			by_person: actor.personId,
			why: reason || null
		})
		.execute();
	await trx
		.insertInto('statement_rests')
		.values({
			statement_id: id,
			...scope,
			projection_kind: projection.kind,
			projection_subject: projection.subject,
			projection_rev: projection.rev,
			hash: projection.hash
		})
		.execute();
	return id;
}

/**
 * The laboratory's approval; the copy takes the product's next number.
 * @throws Refused 'wrong-state'; 'blocked' when it is out of date or its list has lost its order since.
 */
export function approveForLaboratory(actor: Actor, slug: string, id: string, reason: string): Promise<number> {
	requireAct(actor, 'approveCopyForLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const copy = await lockCopy(trx, product.id, id);
		requireState(copy, 'inReview');
		requireTrue(copy);
		// A release can widen a range and leave the text alone: the order is judged again, and only new questions are asked.
		const reading = await readProduct(trx, product, today());
		const judged = judge(copy.content, standingOf(reading, false));
		const questions = judged.questions.filter(({ name }) => !copy.basis?.asked.includes(name));
		requireSound({ ...judged, questions }, reason);
		const number = await takeNumber(trx, product.id);
		await trx.updateTable('label_copy').set({ state: 'approvedByLaboratory', number }).where('id', '=', id).execute();
		await decide(trx, actor, copy, 'officer', 'approved', reason || null);
		await record(trx, actor, copy, {
			action: 'copy-approved-by-laboratory',
			after: { number, contentHash: copy.contentHash },
			reason: reason || null
		});
		return number;
	});
}

async function decide(
	trx: Trx,
	actor: Actor,
	copy: CopyRow,
	asRole: 'officer' | 'client',
	decision: 'approved' | 'sentBack',
	comment: string | null
): Promise<void> {
	await trx
		.insertInto('label_approval')
		.values({
			id: newId(),
			copy_id: copy.id,
			product_id: copy.productId,
			client_id: copy.clientId,
			as_role: asRole,
			person_id: actor.personId,
			decision,
			comment,
			content_hash: copy.contentHash ?? ''
		})
		.execute();
}

/**
 * Keeps the copy as sent back with its comment and begins a draft with the same words; gives the draft's id. An officer may
 * until the client has approved; a client only what waits for the own approval.
 * @throws Refused 'wrong-state'.
 */
export function sendBackCopy(actor: Actor, slug: string, id: string, comment: string): Promise<string> {
	const asRole = actor.side === 'client' ? 'client' : 'officer';
	requireAct(actor, asRole === 'client' ? 'approveCopyAsClient' : 'approveCopyForLaboratory');
	return withActor(actor, async (trx) => {
		const copy = await copyOf(trx, slug, id);
		if (asRole === 'client') requireShown(actor, copy);
		requireState(copy, ...(asRole === 'client' ? [] : (['inReview'] as const)), 'approvedByLaboratory');
		await trx.updateTable('label_copy').set({ state: 'sentBack' }).where('id', '=', id).execute();
		await decide(trx, actor, copy, asRole, 'sentBack', comment);
		await record(trx, actor, copy, { action: 'copy-sent-back', before: { state: copy.state }, reason: comment });
		return insertDraft(
			trx,
			actor,
			{ id: copy.productId, clientId: copy.clientId },
			{
				packId: copy.packId,
				market: copy.market,
				content: { ...copy.content, ingredients: '' },
				replacesId: copy.id
			}
		);
	});
}

/** States in which a client knows of a copy; an earlier one does not exist for the client's side. */
export const SHOWN_TO_CLIENT: readonly CopyState[] = [
	'approvedByLaboratory',
	'approvedByClient',
	'inUse',
	'superseded'
];

function requireShown(actor: Actor, copy: CopyRow): void {
	const known = copy.number !== null && (SHOWN_TO_CLIENT.includes(copy.state) || copy.state === 'sentBack');
	if (actor.clientId !== copy.clientId || !known) throw new Refused('not-found');
}

/**
 * The client's approval of exactly the text that was shown.
 * @throws Refused 'not-found' for another client's copy; 'wrong-state'; 'conflict' for another text; 'blocked' when out of date.
 */
export function approveAsClient(actor: Actor, slug: string, id: string, contentHash: string): Promise<void> {
	requireAct(actor, 'approveCopyAsClient');
	return withActor(actor, async (trx) => {
		const copy = await copyOf(trx, slug, id);
		requireShown(actor, copy);
		requireState(copy, 'approvedByLaboratory');
		if (copy.contentHash !== contentHash) throw new Refused('conflict', { contentHash: copy.contentHash });
		requireTrue(copy);
		await trx.updateTable('label_copy').set({ state: 'approvedByClient' }).where('id', '=', id).execute();
		await decide(trx, actor, copy, 'client', 'approved', null);
		await record(trx, actor, copy, { action: 'copy-approved-by-client', after: { contentHash } });
	});
}

/**
 * The first batch that carries the copy. The copy in use until now is superseded with its last batch.
 * @throws Refused 'wrong-state'; 'blocked' when out of date or overtaken; 'invalid' without the earlier copy's last batch.
 */
export function putCopyInUse(actor: Actor, slug: string, input: FirstBatch): Promise<void> {
	requireAct(actor, 'putCopyInUse');
	return withActor(actor, async (trx) => {
		const copy = await copyOf(trx, slug, input.copyId);
		requireState(copy, 'approvedByClient');
		requireTrue(copy);
		if (copy.overtaken) throw new Refused('blocked', { faults: [{ kind: 'overtaken' }] });
		const present = (await copiesOf(trx, copy.productId)).find(
			(each) => each.packId === copy.packId && each.market === copy.market && each.state === 'inUse'
		);
		if (present) await supersede(trx, actor, present, input);
		await trx
			.updateTable('label_copy')
			.set({ state: 'inUse', first_batch: input.firstBatch })
			.where('id', '=', copy.id)
			.execute();
		await record(trx, actor, copy, { action: 'copy-in-use', after: { firstBatch: input.firstBatch } });
	});
}

async function supersede(trx: Trx, actor: Actor, present: CopyRow, { lastBatch, copyId }: FirstBatch): Promise<void> {
	if (lastBatch === '') throw new Refused('invalid', { field: 'lastBatch', value: '' });
	await trx
		.updateTable('label_copy')
		.set({ state: 'superseded', last_batch: lastBatch })
		.where('id', '=', present.id)
		.execute();
	await record(trx, actor, present, { action: 'copy-superseded', after: { lastBatch, by: copyId } });
}
