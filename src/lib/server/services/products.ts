import { sql } from 'kysely';
import type { ListQuery, Page } from '$lib/schemas/paging';
import { slugOf, type ProductInput } from '$lib/schemas/product';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { newId } from '../db/id';
import { listClients, type ClientRow } from '../db/people';
import { listProducts, packsOf, productById, productBySlug, type PackRow, type ProductRow } from '../db/products';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { stampProduct } from './moves';

export function readProducts(actor: Actor, query: ListQuery): Promise<Page<ProductRow>> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, (trx) => listProducts(trx, query));
}

export interface ProductChoices {
	readonly clients: readonly ClientRow[];
	readonly formulas: readonly { readonly code: string; readonly name: string }[];
}

/** What a new product can be made for and of. */
export function productChoices(actor: Actor): Promise<ProductChoices> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => ({
		clients: await listClients(trx),
		formulas: await trx.selectFrom('formula').select(['code', 'name']).orderBy('code').limit(1000).execute()
	}));
}

/** Makes a product of a client from a formula, for the EU, with its first pack. @throws Refused 'invalid' for an unknown formula. */
export function createProduct(actor: Actor, input: ProductInput): Promise<string> {
	requireAct(actor, 'editProduct');
	return withActor(actor, async (trx) => {
		const formula = await trx
			.selectFrom('formula')
			.select('id')
			.where('code', '=', input.formulaCode.toUpperCase())
			.executeTakeFirst();
		if (!formula) throw new Refused('invalid', { field: 'formulaCode', value: input.formulaCode });
		const client = await trx.selectFrom('client').select('id').where('id', '=', input.clientId).executeTakeFirst();
		if (!client) throw new Refused('invalid', { field: 'clientId', value: input.clientId });
		const slug = await freeSlug(trx, slugOf(input.name) || 'product');
		const id = newId<'product'>();
		await insertProduct(trx, actor, id, slug, formula.id, input);
		await stampProduct(trx, await productById(trx, id), today());
		await audit(trx, actor, {
			stream: { kind: 'product', id },
			action: 'product-created',
			subject: `product/${id}`,
			after: input
		});
		return slug;
	});
}

async function insertProduct(
	trx: Trx,
	actor: Actor,
	id: string,
	slug: string,
	formulaId: string,
	input: ProductInput
): Promise<void> {
	const scope = { product_id: id, client_id: input.clientId };
	const by = { created_by: actor.personId };
	await trx
		.insertInto('product')
		.values({
			id,
			client_id: input.clientId,
			slug,
			name: input.name,
			brand_name: input.brandName,
			function_text: input.functionText,
			product_type: input.productType,
			stay: input.stay,
			sites: input.sites,
			ages: input.ages,
			spray: input.spray,
			...by
		})
		.execute();
	await trx
		.insertInto('product_formula')
		.values({ ...scope, formula_id: formulaId, client_code: input.clientCode || null, ...by })
		.execute();
	await trx
		.insertInto('product_market')
		.values({
			...scope,
			market: 'EU',
			responsible_name: input.responsibleName,
			responsible_address: input.responsibleAddress,
			origin_country: input.originCountry
		})
		.execute();
	const { name, size, unit, gtin } = input.pack;
	await trx
		.insertInto('pack')
		.values({ ...scope, id: newId(), name, size: size.replace(',', '.'), unit, gtin: gtin || null, ...by })
		.execute();
}

/** The slug, or the slug with the next free number behind it. */
async function freeSlug(trx: Trx, slug: string): Promise<string> {
	// Products of clients that this person may not see take their slugs as well; the unique index has the last word.
	const { rows } = await sql<{ slug: string }>`
		select slug from product where slug = ${slug} or slug like ${`${slug}-%`}`.execute(trx);
	const taken = new Set(rows.map((row) => row.slug));
	if (!taken.has(slug)) return slug;
	let number = 2;
	while (taken.has(`${slug}-${number}`)) number += 1;
	return `${slug}-${number}`;
}

export interface ProductHead {
	readonly product: ProductRow;
	readonly packs: readonly PackRow[];
}

export function readProductHead(actor: Actor, slug: string): Promise<ProductHead> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const product = await productBySlug(trx, slug);
		return { product, packs: await packsOf(trx, product.id) };
	});
}
