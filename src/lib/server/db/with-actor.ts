import { sql, type Transaction } from 'kysely';
import { seesAssignedOnly, type Actor } from '../access/actor';
import { handle } from './pool';
import type { Database } from './schema';

export type Trx = Transaction<Database>;

/** Runs fn in one transaction in which row-level security knows the actor. Nothing of a refusal is kept. */
export function withActor<T>(actor: Actor, fn: (trx: Trx) => Promise<T>): Promise<T> {
	return handle()
		.transaction()
		.execute(async (trx) => {
			await sql`
				select set_config('costmary.side', ${actor.side}, true),
					set_config('costmary.person', ${actor.personId}, true),
					set_config('costmary.client', ${actor.clientId ?? ''}, true)`.execute(trx);
			if (seesAssignedOnly(actor)) await limitToAssignedProducts(trx, actor);
			return fn(trx);
		});
}

async function limitToAssignedProducts(trx: Trx, actor: Actor): Promise<void> {
	const rows = await trx
		.selectFrom('product_assessor')
		.select('product_id')
		.where('person_id', '=', actor.personId)
		.execute();
	const list = `{${rows.map((row) => row.product_id).join(',')}}`;
	await sql`select set_config('costmary.products', ${list}, true)`.execute(trx);
}
