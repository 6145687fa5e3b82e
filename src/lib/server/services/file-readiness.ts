import { readSections, type FileFacts, type SectionReading } from '$lib/domain/file/readiness';
import { needOf } from '$lib/domain/file/sections';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { claimsOf } from '../db/claims';
import { copyStanding, filedDocuments, isBeingRechecked, materialDocuments, needDecisions } from '../db/file-facts';
import { newId } from '../db/id';
import { productBySlug, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { stateOf } from './claims';
import { readProduct, type Reading } from './readings';

export interface FileReadiness {
	readonly sections: readonly SectionReading[];
	readonly reading: Reading;
}

/** Collects the facts of a product's file and reads what each section holds and lacks. */
export async function readinessOf(trx: Trx, product: ProductRow): Promise<FileReadiness> {
	const day = today();
	const reading = await readProduct(trx, product, day);
	const basis = reading.kind === 'nothingReleased' ? null : reading.basis;
	const version = basis?.formulaVersion.id ?? null;
	const claims = await claimsOf(trx, product.id);
	const decisions = await needDecisions(trx, product.id);
	const facts: FileFacts = {
		day,
		formulaVersion: version,
		beingRechecked: await isBeingRechecked(trx, product),
		materials: await materialDocuments(trx, [...(basis?.materials.values() ?? [])]),
		filed: await filedDocuments(trx, product.id),
		copy: await copyStanding(trx, product.id),
		claims: claims.map((claim) => ({ wording: claim.wording, state: stateOf(claim, version, day) })),
		decisions: new Map(decisions.map(({ need, applicable, reason }) => [need, { applicable, reason }]))
	};
	return { sections: readSections(facts), reading };
}

export interface NeedDecisionInput {
	readonly need: string;
	readonly applicable: boolean;
	readonly reason: string;
}

/** Sets a need not applicable, or applicable again, with the reason that the file prints. */
export function decideNeed(actor: Actor, slug: string, input: NeedDecisionInput): Promise<void> {
	requireAct(actor, 'setNeedNotApplicable');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		if (!needOf(input.need)) throw new Refused('invalid', { field: 'need', value: input.need });
		await trx
			.insertInto('need_decision')
			.values({
				id: newId(),
				product_id: product.id,
				client_id: product.clientId,
				need: input.need,
				applicable: input.applicable,
				reason: input.reason,
				by_person: actor.personId
			})
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'product', id: product.id },
			action: input.applicable ? 'need-applicable' : 'need-not-applicable',
			subject: `need/${input.need}`,
			reason: input.reason
		});
	});
}
