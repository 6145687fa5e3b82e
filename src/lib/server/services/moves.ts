import { sql } from 'kysely';
import type { IsoDate } from '$lib/domain/quantity/units';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { liveCopiesOf } from '../db/copies';
import { newId } from '../db/id';
import { formulasUsingMaterial, productById, productsUsingFormulas, type ProductRow } from '../db/products';
import type { CopyState } from '../db/schema';
import type { Trx } from '../db/with-actor';
import { projectionOf, readProduct, type HashedProjection, type Reading } from './readings';

/** What was released. `label` names it for people, as in "Brackmul GA-20, version 5". */
export type Cause =
	| { readonly kind: 'formula'; readonly versionId: string; readonly formulaId: string; readonly label: string }
	| { readonly kind: 'material'; readonly versionId: string; readonly materialId: string; readonly label: string }
	/** A decision about the product itself; `versionId` is the decision's. */
	| { readonly kind: 'product'; readonly versionId: string; readonly label: string };
type Release = Exclude<Cause, { kind: 'product' }>;

export interface CopyEffect {
	readonly productId: string;
	readonly productSlug: string;
	readonly productName: string;
	readonly copyId: string;
	readonly copyNumber: number | null;
	readonly copyState: CopyState;
	readonly effect: 'saysSomethingElse' | 'untouched';
	readonly oldText: string;
	readonly newText: string;
}

/**
 * Carries a release to every product that it may touch, in the release's own transaction: raises what the product's statements
 * are compared with, restamps the projection and records for each live copy whether its text moved.
 */
export async function moveProducts(trx: Trx, actor: Actor, cause: Release): Promise<readonly CopyEffect[]> {
	const formulas = cause.kind === 'formula' ? [cause.formulaId] : await formulasUsingMaterial(trx, cause.materialId);
	const products = await productsUsingFormulas(trx, formulas);
	const effects: CopyEffect[] = [];
	for (const id of products) effects.push(...(await moveProduct(trx, actor, id, cause)));
	return effects;
}

/** The same for one product, whose own decisions move it too. */
export async function moveProduct(trx: Trx, actor: Actor, id: string, cause: Cause): Promise<readonly CopyEffect[]> {
	await trx
		.updateTable('product')
		.set({ inputs_rev: sql<string>`inputs_rev + 1` })
		.where('id', '=', id)
		.execute();
	const product = await productById(trx, id);
	const { reading } = await stampProduct(trx, product, today());
	return recordEffects(trx, actor, product, reading, cause);
}

/** Recomputes what the product's statements rest on and stamps it with the product's present revision of inputs. */
export async function stampProduct(
	trx: Trx,
	product: ProductRow,
	day: IsoDate
): Promise<{ readonly reading: Reading; readonly projection: HashedProjection }> {
	const reading = await readProduct(trx, product, day);
	const projection = projectionOf(reading);
	const values = {
		fn_rev: projection.rev,
		inputs_rev: product.inputsRev,
		hash: projection.hash,
		text: projection.text
	};
	await trx
		.insertInto('projection')
		.values({
			product_id: product.id,
			client_id: product.clientId,
			kind: projection.kind,
			subject: projection.subject,
			...values
		})
		.onConflict((conflict) =>
			conflict.columns(['product_id', 'kind', 'subject']).doUpdateSet({ ...values, stamped_at: sql`now()` })
		)
		.execute();
	return { reading, projection };
}

async function recordEffects(
	trx: Trx,
	actor: Actor,
	product: ProductRow,
	reading: Reading,
	cause: Cause
): Promise<CopyEffect[]> {
	const copies = await liveCopiesOf(trx, product.id);
	const newText = reading.kind === 'reading' ? reading.list.text : '';
	const effects = copies.map((copy): CopyEffect => {
		const oldText = copy.ingredients;
		return {
			productId: product.id,
			productSlug: product.slug,
			productName: product.name,
			copyId: copy.id,
			copyNumber: copy.number,
			copyState: copy.state,
			effect: oldText === newText ? 'untouched' : 'saysSomethingElse',
			oldText,
			newText
		};
	});
	for (const effect of effects) {
		await trx
			.insertInto('copy_effect')
			.values({
				id: newId(),
				copy_id: effect.copyId,
				product_id: product.id,
				client_id: product.clientId,
				effect: effect.effect,
				cause_kind: cause.kind,
				cause_version_id: cause.versionId,
				cause: cause.label,
				old_text: effect.oldText,
				new_text: effect.newText
			})
			.execute();
	}
	await audit(trx, actor, {
		stream: { kind: 'product', id: product.id },
		action: 'inputs-moved',
		subject: `${cause.kind}-version/${cause.versionId}`,
		after: { cause: cause.label, copies: effects.map(({ copyId, effect }) => ({ copyId, effect })) }
	});
	return effects;
}
