import type { Actor } from '../access/actor';
import { withActor, type Trx } from '../db/with-actor';

type Counted = 'product' | 'material' | 'formula' | 'document';

const countOf = async (trx: Trx, table: Counted) => {
	const { total } = await trx
		.selectFrom(table)
		.select((eb) => eb.fn.countAll<string>().as('total'))
		.executeTakeFirstOrThrow();
	return total;
};

/** How much there is beside each place of the spine, as far as this person may see it. */
export const workspaceCounts = (actor: Actor) =>
	withActor(actor, async (trx) => ({
		products: await countOf(trx, 'product'),
		materials: await countOf(trx, 'material'),
		formulas: await countOf(trx, 'formula'),
		evidence: await countOf(trx, 'document')
	}));
