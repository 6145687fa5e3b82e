import type { PackInput } from '$lib/schemas/product';
import type { ProductDetails } from '$lib/schemas/product-details';
import { may, requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { newId } from '../db/id';
import { allAssessors, assessorsOf, deleteAssessor, insertAssessor, type AssessorRow } from '../db/product-details';
import { marketsOf, packsOf, productBySlug, type PackRow, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';

export interface ProductDetailsView {
	readonly product: ProductRow;
	readonly details: ProductDetails;
	readonly packs: readonly PackRow[];
	readonly assessors: readonly AssessorRow[];
	/** Whom the officer may assign; empty for everybody else. */
	readonly assignable: readonly AssessorRow[];
	readonly mayEdit: boolean;
}

async function detailsOf(trx: Trx, product: ProductRow): Promise<ProductDetails> {
	const markets = await marketsOf(trx, product.id);
	const eu = markets.find(({ market }) => market === 'EU');
	return {
		rev: product.rev,
		name: product.name,
		brandName: product.brandName,
		functionText: product.functionText,
		clientCode: product.clientCode ?? '',
		responsibleName: eu?.responsibleName ?? '',
		responsibleAddress: eu?.responsibleAddress ?? '',
		originCountry: eu?.originCountry ?? ''
	};
}

export function readProductDetails(actor: Actor, slug: string): Promise<ProductDetailsView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const mayEdit = may(actor, 'editProduct');
		const assessors = await assessorsOf(trx, product.id);
		const assigned = new Set(assessors.map(({ id }) => id));
		return {
			product,
			details: await detailsOf(trx, product),
			packs: await packsOf(trx, product.id),
			assessors,
			assignable: mayEdit ? (await allAssessors(trx)).filter(({ id }) => !assigned.has(id)) : [],
			mayEdit
		};
	});
}

/** @throws Refused 'conflict' with what stands now, when somebody else saved in between. */
export function saveProductDetails(actor: Actor, slug: string, input: ProductDetails): Promise<number> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const before = await detailsOf(trx, product);
		const { numUpdatedRows } = await trx
			.updateTable('product')
			.set({
				name: input.name,
				brand_name: input.brandName,
				function_text: input.functionText,
				rev: input.rev + 1
			})
			.where('id', '=', product.id)
			.where('rev', '=', input.rev)
			.executeTakeFirst();
		if (numUpdatedRows === 0n) throw new Refused('conflict', { rev: product.rev, theirs: before });
		await trx
			.updateTable('product_formula')
			.set({ client_code: input.clientCode || null })
			.where('product_id', '=', product.id)
			.execute();
		await trx
			.updateTable('product_market')
			.set({
				responsible_name: input.responsibleName,
				responsible_address: input.responsibleAddress,
				origin_country: input.originCountry
			})
			.where('product_id', '=', product.id)
			.where('market', '=', 'EU')
			.execute();
		await record(trx, actor, product, 'details-saved', { before, after: input });
		return input.rev + 1;
	});
}

export function addPack(actor: Actor, slug: string, { name, size, unit, gtin }: PackInput): Promise<string> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const id = newId<'pack'>();
		const pack = { name, size: size.replace(',', '.'), unit, gtin: gtin || null };
		await trx
			.insertInto('pack')
			.values({ ...pack, id, product_id: product.id, client_id: product.clientId, created_by: actor.personId })
			.execute();
		await record(trx, actor, product, 'pack-added', { after: pack });
		return id;
	});
}

/** The assessor sees the product from now on. @throws Refused 'invalid' for somebody without the assessor's role. */
export function assignAssessor(actor: Actor, slug: string, personId: string): Promise<void> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		const person = (await allAssessors(trx)).find(({ id }) => id === personId);
		if (!person) throw new Refused('invalid', { field: 'personId', value: personId });
		if (!(await insertAssessor(trx, actor, product, personId))) return;
		await record(trx, actor, product, 'assessor-assigned', { after: { personId } });
	});
}

export function withdrawAssessor(actor: Actor, slug: string, personId: string): Promise<void> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		if (!(await deleteAssessor(trx, product, personId))) throw new Refused('not-found');
		await record(trx, actor, product, 'assessor-withdrawn', { before: { personId } });
	});
}

const record = (
	trx: Trx,
	actor: Actor,
	{ id }: ProductRow,
	action: string,
	what: { readonly before?: object; readonly after?: object }
) => audit(trx, actor, { stream: { kind: 'product', id }, action, subject: `product/${id}`, ...what });
