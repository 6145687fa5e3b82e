import type { IngredientList } from '../ingredients/types';
import { canonicalText } from './canonical';

/** The canonical text that a statement rests on; `rev` is the projection function's own. The caller hashes it. */
export interface Projection {
	readonly kind: string;
	readonly subject: string;
	readonly rev: number;
	readonly text: string;
}

/** Raise only when the golden text in the tests must change. */
const LIST_REVISION = 1;

/** A list rests on its printed names in their order and on the market, not on percentages. */
export const listProjection = (list: IngredientList): Projection => ({
	kind: 'list',
	subject: list.market,
	rev: LIST_REVISION,
	text: canonicalText({ market: list.market, names: list.entries.map((entry) => entry.name) })
});
