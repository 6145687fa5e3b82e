import { formatExact } from '$lib/domain/quantity/decimal';
import { compare, type IsoDate } from '$lib/domain/quantity/units';
import type { BasisView } from '$lib/schemas/list-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { productBySlug, type ProductRow } from '../db/products';
import { formulaCodes } from '../db/reasons';
import { withActor } from '../db/with-actor';
import { basisView, formulaIdsOf } from './product-list';
import { readProduct, type Reading } from './readings';

export interface CompositionRowView {
	readonly key: string;
	readonly inci: string;
	readonly cas: readonly string[];
	readonly roles: readonly string[];
	readonly nano: boolean;
	readonly low: string;
	readonly typical: string;
	readonly high: string;
	readonly basis: 'declared' | 'normalised' | 'derived';
	readonly materials: readonly string[];
}
export interface ProductCompositionView {
	readonly product: ProductRow;
	readonly state: Reading['kind'];
	readonly basis: BasisView | null;
	readonly rows: readonly CompositionRowView[];
	readonly faults: readonly { readonly kind: string; readonly material: string | null }[];
}

/** Everything the product consists of, impurities and parts of parts among it, heaviest first. */
export function readProductComposition(actor: Actor, slug: string, batchDay: IsoDate): Promise<ProductCompositionView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const reading = await readProduct(trx, product, batchDay);
		if (reading.kind === 'nothingReleased') return { product, state: reading.kind, basis: null, rows: [], faults: [] };
		const basis = basisView(reading.basis, await formulaCodes(trx, formulaIdsOf(reading.basis)));
		if (reading.kind === 'faults') {
			const faults = reading.faults.map((fault) => ({
				kind: fault.kind === 'material' ? fault.fault.kind : fault.kind,
				material: 'material' in fault ? (reading.basis.materials.get(fault.material)?.tradeName ?? null) : null
			}));
			return { product, state: reading.kind, basis, rows: [], faults };
		}
		const { composition, substances } = reading;
		const text = (value: bigint) => formatExact(value, composition.shareDecimals);
		const rows = [...composition.rows]
			.sort((a, b) => compare(b.share.typical, a.share.typical))
			.map((row): CompositionRowView => {
				const identity = substances.get(row.substance);
				return {
					key: row.key,
					inci: identity?.inci ?? '',
					cas: identity?.cas ?? [],
					roles: [...row.roles],
					nano: row.nano,
					low: text(row.share.low),
					typical: text(row.share.typical),
					high: text(row.share.high),
					basis: row.share.basis,
					materials: [
						...new Set(row.contributions.map((each) => reading.basis.materials.get(each.material)?.tradeName ?? ''))
					]
				};
			});
		return { product, state: reading.kind, basis, rows, faults: [] };
	});
}
