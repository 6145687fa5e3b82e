import { carryOverKey } from '$lib/domain/ingredients/types';
import type { Id } from '$lib/domain/quantity/units';
import { newId } from './id';
import type { ProductRow } from './products';
import type { Market } from './schema';
import type { Trx } from './with-actor';

export interface ListDecisions {
	/** Printed names in the officer's order; null where nobody has arranged the list, or the usual order was taken back. */
	readonly arrangement: readonly string[] | null;
	/** Justified carry-over, as carryOverKey. */
	readonly leftOutCarryOver: ReadonlySet<string>;
}

/** What officers have decided about a product's list of one market; the newest decision of each kind counts. */
export async function listDecisions(trx: Trx, productId: string, market: Market): Promise<ListDecisions> {
	const arranged = await trx
		.selectFrom('arrangement')
		.select('ordering')
		.where('product_id', '=', productId)
		.where('market', '=', market)
		.orderBy('id', 'desc')
		.limit(1)
		.executeTakeFirst();
	const decisions = await trx
		.selectFrom('carry_over_decision')
		.distinctOn(['substance_id', 'material_id'])
		.select(['substance_id', 'material_id', 'left_out'])
		.where('product_id', '=', productId)
		.orderBy('substance_id')
		.orderBy('material_id')
		.orderBy('id', 'desc')
		.execute();
	const leftOut = decisions.filter(({ left_out }) => left_out);
	return {
		arrangement: arranged && arranged.ordering.length > 0 ? arranged.ordering : null,
		leftOutCarryOver: new Set(
			leftOut.map((row) => carryOverKey(row.substance_id as Id<'substance'>, row.material_id as Id<'material'>))
		)
	};
}

interface By {
	readonly product: ProductRow;
	readonly personId: string;
}

export async function insertArrangement(
	trx: Trx,
	{ product, personId }: By,
	market: Market,
	ordering: readonly string[]
): Promise<string> {
	const id = newId();
	await trx
		.insertInto('arrangement')
		.values({
			id,
			product_id: product.id,
			client_id: product.clientId,
			market,
			ordering: JSON.stringify(ordering),
			created_by: personId
		})
		.execute();
	return id;
}

export interface CarryOverChoice {
	readonly substanceId: string;
	readonly materialId: string;
	readonly leftOut: boolean;
	readonly reason: string;
}

export async function insertCarryOver(
	trx: Trx,
	{ product, personId }: By,
	{ substanceId, materialId, leftOut, reason }: CarryOverChoice
): Promise<string> {
	const id = newId();
	await trx
		.insertInto('carry_over_decision')
		.values({
			id,
			product_id: product.id,
			client_id: product.clientId,
			substance_id: substanceId,
			material_id: materialId,
			left_out: leftOut,
			reason,
			created_by: personId
		})
		.execute();
	return id;
}
