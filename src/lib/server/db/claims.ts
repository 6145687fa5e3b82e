import { Refused } from '../refused';
import type { Criterion } from './schema';
import type { Trx } from './with-actor';

export interface ClaimRow {
	readonly id: string;
	readonly wording: string;
	readonly kind: string;
	readonly market: string;
	readonly rev: number;
	readonly answers: readonly {
		readonly criterion: Criterion;
		readonly answer: string;
		readonly by: string;
		readonly at: Date;
	}[];
	readonly evidence: readonly {
		readonly linkId: string;
		readonly documentId: string;
		readonly title: string;
		readonly expires: string | null;
		readonly formulaVersionId: string | null;
		readonly formulaNumber: number | null;
	}[];
}

export async function claimsOf(trx: Trx, productId: string): Promise<ClaimRow[]> {
	const claims = await trx
		.selectFrom('claim')
		.select(['id', 'wording', 'kind', 'market', 'rev'])
		.where('product_id', '=', productId)
		.where('withdrawn_at', 'is', null)
		.orderBy('created_at')
		.orderBy('id')
		.execute();
	const answers = await trx
		.selectFrom('claim_criterion')
		.innerJoin('person', 'person.id', 'claim_criterion.by_person')
		.select(['claim_id', 'criterion', 'answer', 'person.name as by', 'at'])
		.where('product_id', '=', productId)
		.execute();
	const evidence = await trx
		.selectFrom('claim_evidence')
		.innerJoin('document', 'document.id', 'claim_evidence.document_id')
		.leftJoin('formula_version', 'formula_version.id', 'claim_evidence.formula_version_id')
		.select([
			'claim_evidence.id as linkId',
			'claim_id',
			'document.id as documentId',
			'document.title',
			'document.expires',
			'formula_version_id as formulaVersionId',
			'formula_version.number as formulaNumber'
		])
		.where('claim_evidence.product_id', '=', productId)
		.where('claim_evidence.withdrawn_at', 'is', null)
		.orderBy('claim_evidence.created_at')
		.execute();
	return claims.map((claim) => ({
		...claim,
		answers: answers.filter((answer) => answer.claim_id === claim.id),
		evidence: evidence.filter((link) => link.claim_id === claim.id)
	}));
}

/** @throws Refused 'not-found', also for a claim of a product that this actor may not see. */
export async function lockClaim(trx: Trx, productId: string, claimId: string) {
	const row = await trx
		.selectFrom('claim')
		.select(['id', 'client_id', 'wording', 'rev'])
		.where('id', '=', claimId)
		.where('product_id', '=', productId)
		.where('withdrawn_at', 'is', null)
		.forUpdate()
		.executeTakeFirst();
	if (!row) throw new Refused('not-found');
	return row;
}
