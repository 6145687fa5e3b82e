import type { Durability, LabelContent } from '$lib/domain/label/types';
import type { CopyDraft } from '$lib/schemas/label-copy';
import type { MarketRow, PackRow, ProductRow } from '../db/products';

/** Trailing zeros of the database's scale are nobody's typing. */
const plain = (decimal: string) => (decimal.includes('.') ? decimal.replace(/\.?0+$/, '') : decimal);

/**
 * The words a new copy begins with. What product, pack and market say is always taken from them; what was written for an
 * earlier copy of the same pack and market (directions, precautions, durability, marks) goes on.
 */
export function draftContent(
	product: ProductRow,
	pack: PackRow,
	market: MarketRow,
	earlier: LabelContent | null
): LabelContent {
	return {
		form: 1,
		brand: product.brandName,
		name: product.name,
		function: product.functionText,
		content: { size: plain(pack.size), unit: pack.unit, eMark: earlier?.content.eMark ?? false },
		directions: earlier?.directions ?? '',
		precautions: earlier?.precautions ?? '',
		ingredients: '',
		durability: earlier?.durability ?? null,
		batch: earlier?.batch ?? 'printed at filling',
		responsible: { name: market.responsibleName, address: market.responsibleAddress },
		imported: market.originCountry !== '',
		origin: market.originCountry
	};
}

function durabilityOf({ durability, months, reason }: CopyDraft): Durability | null {
	if (durability === 'open') return null;
	if (durability === 'notNeeded') return { kind: 'notNeeded', reason };
	return { kind: durability, months: Number(months) };
}

/** A draft's words after an edit; size and unit stay the pack's, and a draft has no list of its own. */
export const editedContent = (before: LabelContent, draft: CopyDraft): LabelContent => ({
	form: 1,
	brand: draft.brand,
	name: draft.name,
	function: draft.function,
	content: { ...before.content, eMark: draft.eMark },
	directions: draft.directions,
	precautions: draft.precautions,
	ingredients: '',
	durability: durabilityOf(draft),
	batch: draft.batch,
	responsible: { name: draft.responsibleName, address: draft.responsibleAddress },
	imported: draft.imported,
	origin: draft.imported ? draft.origin : ''
});
