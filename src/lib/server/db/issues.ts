import { sql } from 'kysely';
import type { CounterIssue } from '$lib/schemas/copy-view';
import type { Trx } from './with-actor';

/** A product's built files as a client may know of them: number, date, hash, and whether one was shared. */
export async function issuesOf(trx: Trx, productId: string): Promise<CounterIssue[]> {
	const rows = await trx
		.selectFrom('product_file')
		.innerJoin('product_file_built', 'product_file_built.product_file_id', 'product_file.id')
		.select([
			'product_file.number',
			'product_file_built.sha256',
			'product_file_built.pages',
			'product_file_built.built_at',
			sql<boolean>`exists (select 1 from product_file_share s where s.product_file_id = product_file.id)`.as('shared')
		])
		.where('product_file.product_id', '=', productId)
		.orderBy('product_file.number', 'desc')
		.execute();
	return rows.map(({ built_at, ...row }) => ({ ...row, date: built_at.toISOString() }));
}
