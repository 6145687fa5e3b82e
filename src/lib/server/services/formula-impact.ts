import type { ImpactView, ProductImpact } from '$lib/schemas/family-view';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { today } from '../clock';
import type { FormulaVersionRef } from '../db/basis';
import { liveCopiesOf } from '../db/copies';
import { familyOf } from '../db/families';
import { formulaByCode, versionRef, versionsOfFormula } from '../db/formulas';
import { productById, productsUsingFormulas } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { readProduct, readWith, type Reading } from './readings';

/** The draft of a formula as if it were released now. @throws Refused 'not-found' where there is none. */
async function draftOf(trx: Trx, code: string): Promise<FormulaVersionRef> {
	const formula = await formulaByCode(trx, code);
	const draft = (await versionsOfFormula(trx, formula.id)).find(({ state }) => state === 'draft');
	if (!draft) throw new Refused('not-found');
	return versionRef(formula.id, draft);
}

/** Every product, list and label copy that releasing the saved draft would move; nothing is written. */
export function readImpact(actor: Actor, code: string): Promise<ImpactView> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const draft = await draftOf(trx, code);
		const products: ProductImpact[] = [];
		for (const id of await productsUsingFormulas(trx, [draft.formulaId])) products.push(await impactOn(trx, id, draft));
		const members = await familyOf(trx, draft.formulaId);
		return { number: draft.number, variants: members.map(({ name, pinned }) => ({ name, pinned })), products };
	});
}

const textOf = (reading: Reading) => (reading.kind === 'reading' ? reading.list.text : '');

async function impactOn(trx: Trx, productId: string, draft: FormulaVersionRef): Promise<ProductImpact> {
	const product = await productById(trx, productId);
	const before = textOf(await readProduct(trx, product, today()));
	const after = textOf(await readWith(trx, product, today(), 'EU', draft));
	const copies = await liveCopiesOf(trx, productId);
	return {
		slug: product.slug,
		name: product.name,
		client: product.clientName,
		formulaName: product.formulaName,
		before,
		after,
		moves: before !== after,
		copies: copies.map(({ number, state, ingredients }) => ({ number, state, moves: ingredients !== after }))
	};
}
