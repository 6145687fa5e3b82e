import type { Actor } from '../access/actor';
import { requireRole } from '../access/actor';
import { packsOf, productBySlug, type PackRow } from '../db/products';
import { withActor } from '../db/with-actor';

export interface CounterProduct {
	readonly slug: string;
	readonly name: string;
}
export interface CounterView {
	readonly client: string;
	readonly products: readonly CounterProduct[];
}

/** A client's own products; nobody learns of another's. */
export function readCounter(actor: Actor): Promise<CounterView> {
	requireRole(actor, 'client');
	return withActor(actor, async (trx) => {
		const client = await trx.selectFrom('client').select('name').executeTakeFirst();
		const products = await trx.selectFrom('product').select(['slug', 'name']).orderBy('name').execute();
		return { client: client?.name ?? '', products };
	});
}

export interface CounterProductView {
	readonly name: string;
	readonly functionText: string;
	readonly packs: readonly PackRow[];
}

/** @throws Refused 'not-found', for another client's product as for none. */
export function readCounterProduct(actor: Actor, slug: string): Promise<CounterProductView> {
	requireRole(actor, 'client');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		return { name: product.name, functionText: product.functionText, packs: await packsOf(trx, product.id) };
	});
}
