import { countReady, type Readiness } from '$lib/domain/file/readiness';
import { orderIsCertain } from '$lib/domain/ingredients/list';
import type { Actor } from '../access/actor';
import { copyStanding } from '../db/file-facts';
import { productBySlug } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { readinessOf } from './file-readiness';

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

/** Readiness of a product's parts, for the spine: a state, and figures where they say more than its word. */
export interface PartReadiness {
	readonly state: Readiness;
	readonly figures?: { readonly ready: number; readonly all: number };
}
export type ProductParts = Readonly<Record<'formula' | 'list' | 'label' | 'file', PartReadiness>>;

const LABEL: Readonly<Record<Awaited<ReturnType<typeof copyStanding>>, Readiness>> = {
	none: 'notBegun',
	unapproved: 'incomplete',
	outOfDate: 'outOfDate',
	approved: 'ready'
};

export const readProductParts = (actor: Actor, slug: string): Promise<ProductParts> =>
	withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const { sections, reading } = await readinessOf(trx, product);
		const count = countReady(sections);
		const certain = reading.kind === 'reading' && orderIsCertain(reading.list);
		return {
			formula: { state: reading.kind === 'nothingReleased' ? 'incomplete' : 'ready' },
			list: { state: reading.kind === 'nothingReleased' ? 'notBegun' : certain ? 'ready' : 'incomplete' },
			label: { state: LABEL[await copyStanding(trx, product.id)] },
			file: { state: count.ready === count.all ? 'ready' : 'incomplete', figures: count }
		};
	});
