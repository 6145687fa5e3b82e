import type { Refusal } from '$lib/domain/ingredients/types';
import { formatRatio } from '$lib/domain/quantity/ratio';
import { PART_DECIMALS } from '$lib/domain/quantity/units';
import type { ArrangementInput, CarryOverInput } from '$lib/schemas/list-decision';
import type { RefusalView } from '$lib/schemas/list-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { insertArrangement, insertCarryOver } from '../db/list-decisions';
import { productBySlug, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { moveProduct, type CopyEffect } from './moves';
import { readArranged, type Reading } from './readings';

const TURN_PLACES = 4;
type Read = Extract<Reading, { kind: 'reading' }>;

/**
 * Keeps the officer's order of one market's list. @throws Refused 'blocked' with every place that some composition within the
 * suppliers' ranges would make unlawful, 'wrong-state' where no list can be made.
 */
export function arrangeList(
	actor: Actor,
	slug: string,
	{ market, names }: ArrangementInput
): Promise<readonly CopyEffect[]> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const reading = await readArranged(trx, product, today(), market, names);
		if (reading.kind !== 'reading') throw new Refused('wrong-state', { state: reading.kind });
		if (reading.list.refused.length > 0)
			throw new Refused('blocked', { refusals: reading.list.refused.map((each) => refusalView(each, reading)) });
		const id = await insertArrangement(trx, { product, personId: actor.personId }, market, names);
		const label = names.length > 0 ? 'the list was arranged' : 'the usual order was taken back';
		return decided(trx, actor, product, { id, label, action: 'list-arranged', after: { market, names } });
	});
}

/** Leaves a carried-over substance out of the list, or puts it back; the reason is the justification. */
export function decideCarryOver(actor: Actor, slug: string, input: CarryOverInput): Promise<readonly CopyEffect[]> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		await requireCarriedOver(trx, product, input);
		const id = await insertCarryOver(trx, { product, personId: actor.personId }, input);
		const label = input.leftOut ? 'a carry-over was left out' : 'a carry-over was put back';
		return decided(trx, actor, product, {
			id,
			label,
			action: 'carry-over-decided',
			after: input,
			reason: input.reason
		});
	});
}

/** @throws Refused 'invalid' for a substance that this material does not carry over into this product. */
async function requireCarriedOver(trx: Trx, product: ProductRow, { substanceId, materialId }: CarryOverInput) {
	const reading = await readArranged(trx, product, today(), 'EU', []);
	if (reading.kind !== 'reading') throw new Refused('wrong-state', { state: reading.kind });
	const row = reading.composition.rows.find(({ substance }) => substance === substanceId);
	const carried = row?.contributions.some(({ material, role }) => material === materialId && role === 'carryOver');
	if (!carried) throw new Refused('invalid', { field: 'substanceId', value: substanceId });
}

interface Decision {
	readonly id: string;
	readonly label: string;
	readonly action: string;
	readonly after: object;
	readonly reason?: string;
}

async function decided(trx: Trx, actor: Actor, product: ProductRow, { id, label, action, after, reason }: Decision) {
	await audit(trx, actor, {
		stream: { kind: 'product', id: product.id },
		action,
		subject: `product/${product.id}`,
		after,
		...(reason === undefined ? {} : { reason })
	});
	return moveProduct(trx, actor, product.id, { kind: 'product', versionId: id, label });
}

/** A refused place in figures and names that a person knows. */
export function refusalView({ name, before, because, pair }: Refusal, reading: Read): RefusalView {
	const turnsAt = pair?.turnsAt;
	return {
		name,
		before,
		because,
		turns: turnsAt
			? {
					material: reading.basis.materials.get(turnsAt.material)?.tradeName ?? '',
					inci: reading.substances.get(turnsAt.substance)?.inci ?? '',
					percent: formatRatio(turnsAt.at, PART_DECIMALS, TURN_PLACES, 'nearest')
				}
			: null
	};
}
