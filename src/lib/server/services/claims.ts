import type { IsoDate } from '$lib/domain/quantity/units';
import { CRITERIA, type Answers, type NewClaim } from '$lib/schemas/claim';
import { may, requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { answeringFormulaVersion } from '../db/basis';
import { claimsOf, lockClaim, type ClaimRow } from '../db/claims';
import { documentsOf } from '../db/documents';
import { newId } from '../db/id';
import { productBySlug, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';

export type ClaimState = 'supported' | 'notYet' | 'outOfDate';

/** Supported: all six criteria answered, and evidence that fits the formula version that answers and has not run out. */
export function stateOf(claim: ClaimRow, formulaVersionId: string | null, day: IsoDate): ClaimState {
	const answered = CRITERIA.every((criterion) => claim.answers.some((answer) => answer.criterion === criterion));
	if (!answered || claim.evidence.length === 0) return 'notYet';
	const fits = claim.evidence.some(
		(link) =>
			(link.formulaVersionId === null || link.formulaVersionId === formulaVersionId) &&
			(link.expires === null || link.expires >= day)
	);
	return fits ? 'supported' : 'outOfDate';
}

export interface ClaimsView {
	readonly product: ProductRow;
	readonly claims: readonly (ClaimRow & { readonly state: ClaimState })[];
	readonly documents: Awaited<ReturnType<typeof documentsOf>>;
	readonly formulaNumber: number | null;
	readonly mayEdit: boolean;
}

export function readClaims(actor: Actor, slug: string): Promise<ClaimsView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const version = await answeringFormulaVersion(trx, product.formulaId, product.pinnedVersionId);
		const claims = await claimsOf(trx, product.id);
		return {
			product,
			claims: claims.map((claim) => ({ ...claim, state: stateOf(claim, version?.id ?? null, today()) })),
			documents: await documentsOf(trx, 'product', product.id),
			formulaNumber: version?.number ?? null,
			mayEdit: may(actor, 'editClaim')
		};
	});
}

/** A story that every write on a product's claims shares: find the product, act, audit on its stream. */
function onProduct<T>(
	actor: Actor,
	slug: string,
	fn: (
		trx: Trx,
		product: ProductRow
	) => Promise<{ result: T; action: string; subject: string; before?: unknown; after?: unknown }>
): Promise<T> {
	requireAct(actor, 'editClaim');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const { result, ...entry } = await fn(trx, product);
		await audit(trx, actor, { stream: { kind: 'product', id: product.id }, ...entry });
		return result;
	});
}

export const addClaim = (actor: Actor, slug: string, input: NewClaim): Promise<string> =>
	onProduct(actor, slug, async (trx, product) => {
		const id = newId();
		await trx
			.insertInto('claim')
			.values({
				id,
				product_id: product.id,
				client_id: product.clientId,
				market: 'EU',
				wording: input.wording,
				kind: input.kind,
				created_by: actor.personId
			})
			.execute();
		return { result: id, action: 'claim-added', subject: `claim/${id}`, after: input };
	});

/** Saves the wording and the six answers. @throws Refused 'conflict' when somebody saved in between. */
export const answerClaim = (actor: Actor, slug: string, input: Answers): Promise<number> =>
	onProduct(actor, slug, async (trx, product) => {
		const claim = await lockClaim(trx, product.id, input.claimId);
		if (claim.rev !== input.rev) throw new Refused('conflict', { rev: claim.rev });
		const rev = claim.rev + 1;
		await trx.updateTable('claim').set({ wording: input.wording, rev }).where('id', '=', claim.id).execute();
		const before = (await claimsOf(trx, product.id)).find(({ id }) => id === claim.id)?.answers ?? [];
		for (const criterion of CRITERIA) {
			const answer = input[criterion];
			const old = before.find((each) => each.criterion === criterion);
			if (!answer || old?.answer === answer) continue;
			const values = { answer, by_person: actor.personId, at: new Date(), rev };
			await trx
				.insertInto('claim_criterion')
				.values({ claim_id: claim.id, product_id: product.id, client_id: claim.client_id, criterion, ...values })
				.onConflict((conflict) => conflict.columns(['claim_id', 'criterion']).doUpdateSet(values))
				.execute();
		}
		return {
			result: rev,
			action: 'claim-answered',
			subject: `claim/${claim.id}`,
			before: { wording: claim.wording, answers: before.map(({ criterion, answer }) => ({ criterion, answer })) },
			after: input
		};
	});

/** Links a document of the product as evidence, obtained on the formula version that answers today. */
export const linkEvidence = (
	actor: Actor,
	slug: string,
	input: { readonly claimId: string; readonly documentId: string }
): Promise<string> =>
	onProduct(actor, slug, async (trx, product) => {
		const claim = await lockClaim(trx, product.id, input.claimId);
		const documents = await documentsOf(trx, 'product', product.id);
		if (!documents.some((document) => document.id === input.documentId)) throw new Refused('not-found');
		const version = await answeringFormulaVersion(trx, product.formulaId, product.pinnedVersionId);
		const id = newId();
		await trx
			.insertInto('claim_evidence')
			.values({
				id,
				claim_id: claim.id,
				product_id: product.id,
				client_id: claim.client_id,
				document_id: input.documentId,
				formula_version_id: version?.id ?? null,
				created_by: actor.personId
			})
			.execute();
		return { result: id, action: 'evidence-linked', subject: `claim/${claim.id}`, after: input };
	});

export const unlinkEvidence = (actor: Actor, slug: string, linkId: string): Promise<void> =>
	onProduct(actor, slug, async (trx, product) => {
		await trx
			.updateTable('claim_evidence')
			.set({ withdrawn_at: new Date() })
			.where('id', '=', linkId)
			.where('product_id', '=', product.id)
			.execute();
		return { result: undefined, action: 'evidence-unlinked', subject: `claim-evidence/${linkId}` };
	});

export const withdrawClaim = (actor: Actor, slug: string, claimId: string): Promise<void> =>
	onProduct(actor, slug, async (trx, product) => {
		const claim = await lockClaim(trx, product.id, claimId);
		await trx.updateTable('claim').set({ withdrawn_at: new Date() }).where('id', '=', claim.id).execute();
		return {
			result: undefined,
			action: 'claim-withdrawn',
			subject: `claim/${claim.id}`,
			before: { wording: claim.wording }
		};
	});
