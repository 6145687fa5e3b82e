import type { Actor } from '../access/actor';
import type { ProductRow } from './products';
import type { Trx } from './with-actor';

export interface AssessorRow {
	readonly id: string;
	readonly name: string;
}

export const assessorsOf = (trx: Trx, productId: string): Promise<AssessorRow[]> =>
	trx
		.selectFrom('product_assessor')
		.innerJoin('person', 'person.id', 'product_assessor.person_id')
		.select(['person.id', 'person.name'])
		.where('product_assessor.product_id', '=', productId)
		.orderBy('person.name')
		.execute();

/** Everybody who has the assessor's role and may sign in. */
export const allAssessors = (trx: Trx): Promise<AssessorRow[]> =>
	trx
		.selectFrom('person')
		.innerJoin('membership', 'membership.person_id', 'person.id')
		.select(['person.id', 'person.name'])
		.where('membership.role', '=', 'assessor')
		.where('person.disabled_at', 'is', null)
		.orderBy('person.name')
		.execute();

/** False when the assessor is assigned already. */
export async function insertAssessor(trx: Trx, actor: Actor, product: ProductRow, personId: string): Promise<boolean> {
	const { numInsertedOrUpdatedRows } = await trx
		.insertInto('product_assessor')
		.values({
			product_id: product.id,
			client_id: product.clientId,
			person_id: personId,
			created_by: actor.personId
		})
		.onConflict((conflict) => conflict.columns(['product_id', 'person_id']).doNothing())
		.executeTakeFirstOrThrow();
	return Boolean(numInsertedOrUpdatedRows);
}

/** False when the assessor was not assigned. */
export async function deleteAssessor(trx: Trx, product: ProductRow, personId: string): Promise<boolean> {
	const { numDeletedRows } = await trx
		.deleteFrom('product_assessor')
		.where('product_id', '=', product.id)
		.where('person_id', '=', personId)
		.executeTakeFirst();
	return numDeletedRows > 0n;
}
