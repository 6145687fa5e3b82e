import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { IsoDate } from '$lib/domain/quantity/units';
import type { Actor } from '$lib/server/access/actor';
import { createCopy, saveCopy, submitCopy } from '$lib/server/services/copies';
import { arrangeList, decideCarryOver } from '$lib/server/services/list-decisions';
import { readProductList } from '$lib/server/services/product-list';
import { filledDraft, Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
let officer: Actor;
let client: Actor;
const TODAY = '2026-12-01' as IsoDate;

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	({ officer } = shop);
	client = await shop.client('Pell and Fennick');
	await shop.material('WATER', [{ inci: 'Aqua', typical: '100' }]);
	await shop.material('GLY', [{ inci: 'Glycerin', typical: '100' }]);
	await shop.material('BLEND', [
		{ inci: 'Panthenol', min: '40', max: '60' },
		{ inci: 'Betaine', min: '40', max: '60' }
	]);
	await shop.material('OIL', [
		{ inci: 'Helianthus Annuus Seed Oil', typical: '99.9' },
		{ inci: 'Tocopherol', typical: '0.1', role: 'carryOver' }
	]);
	await shop.material('ALL', [{ inci: 'Allantoin', typical: '100' }]);
	await shop.material('XAN', [{ inci: 'Xanthan Gum', typical: '100' }]);
});
afterAll(() => owner.end());

const refusal = (code: string, data: object = {}) =>
	expect.objectContaining({ code, data: expect.objectContaining(data) });

async function product(code: string, lines: readonly (readonly [string, string])[]): Promise<string> {
	await shop.formula(code, lines);
	return shop.product(client, `Cream ${code}`, code);
}
const LINES = [
	['GLY', '5'],
	['ALL', '0.5'],
	['XAN', '0.3'],
	['WATER', 'rest']
] as const;
const textOf = async (slug: string, market: 'EU' | 'US' = 'EU') =>
	(await readProductList(officer, slug, TODAY, market)).list?.text;

describe('an officer’s order', () => {
	test('is kept for its market only, and the usual order can be taken back', async () => {
		const slug = await product('ORDER', LINES);
		await arrangeList(officer, slug, { market: 'EU', names: ['Aqua', 'Glycerin', 'Xanthan Gum', 'Allantoin'] });
		expect(await textOf(slug)).toBe('Aqua, Glycerin, Xanthan Gum, Allantoin');
		expect(await textOf(slug, 'US')).toBe('Water, Glycerin, Allantoin, Xanthan Gum');
		await arrangeList(officer, slug, { market: 'EU', names: [] });
		expect(await textOf(slug)).toBe('Aqua, Glycerin, Allantoin, Xanthan Gum');
	});

	test('that a supplier’s range could make unlawful is refused with the figure at which it would be', async () => {
		const slug = await product('WEAK', [
			['BLEND', '4'],
			['GLY', '2.2'],
			['WATER', 'rest']
		]);
		// Panthenol is 1.6 to 2.4 % of the whole; before glycerin's 2.2 % it is unlawful below 55 % of the blend.
		const wish = arrangeList(officer, slug, { market: 'EU', names: ['Aqua', 'Panthenol', 'Glycerin', 'Betaine'] });
		await expect(wish).rejects.toThrow(
			refusal('blocked', {
				refusals: expect.arrayContaining([
					{
						name: 'Panthenol',
						before: 'Glycerin',
						because: 'weight',
						turns: { material: 'Trade BLEND', inci: 'Panthenol', percent: '55' }
					}
				])
			})
		);
	});

	test('makes a copy out of date that prints the old order, and is not the formulator’s to give', async () => {
		const slug = await product('COPY', LINES);
		const id = await createCopy(officer, slug, await shop.packOf(slug), 'EU');
		await saveCopy(officer, slug, id, filledDraft());
		await submitCopy(officer, slug, id, '');
		const names = ['Aqua', 'Glycerin', 'Xanthan Gum', 'Allantoin'];
		expect(() => arrangeList(shop.formulator, slug, { market: 'EU', names })).toThrow(refusal('forbidden'));
		expect(await arrangeList(officer, slug, { market: 'EU', names })).toMatchObject([
			{ copyId: id, effect: 'saysSomethingElse', newText: 'Aqua, Glycerin, Xanthan Gum, Allantoin' }
		]);
	});

	test('loses only what a new version of the formula has made unlawful, and says so', async () => {
		const slug = await product('MOVED', LINES);
		await arrangeList(officer, slug, { market: 'EU', names: ['Aqua', 'Glycerin', 'Xanthan Gum', 'Allantoin'] });
		await shop.formula(
			'MOVED',
			[
				['GLY', '5'],
				['ALL', '1.5'],
				['XAN', '0.3'],
				['WATER', 'rest']
			],
			false
		);
		const { list } = await readProductList(officer, slug, TODAY);
		expect(list?.text).toBe('Aqua, Glycerin, Allantoin, Xanthan Gum');
		expect(list?.refused).toMatchObject([{ name: 'Xanthan Gum', before: 'Allantoin' }]);
	});
});

describe('a carry-over', () => {
	test('is listed until a justification leaves it out, for this product alone', async () => {
		const lines = [
			['OIL', '5'],
			['WATER', 'rest']
		] as const;
		const [slug, other] = [await product('CARRY', lines), await product('CARRY-2', lines)];
		expect(await textOf(slug)).toContain('Tocopherol');
		const { list } = await readProductList(officer, slug, TODAY);
		const weighed = list?.entries.find(({ name }) => name === 'Tocopherol')?.weighed[0];
		const { substanceId = '', materialId = '' } = weighed ?? {};
		const reason = 'Protects the oil in its drum; 0.005 % does nothing in the cream.';
		await decideCarryOver(officer, slug, { substanceId, materialId, leftOut: true, reason });
		expect(await textOf(slug)).toBe('Aqua, Helianthus Annuus Seed Oil');
		expect((await readProductList(officer, slug, TODAY)).list?.leftOut).toMatchObject([
			{ name: 'Tocopherol', reason: 'carryOver' }
		]);
		expect(await textOf(other)).toContain('Tocopherol');
	});

	test('that the material does not carry over is refused', async () => {
		const slug = await product('NO-CARRY', LINES);
		const { list } = await readProductList(officer, slug, TODAY);
		const { substanceId = '', materialId = '' } = list?.entries[0]?.weighed[0] ?? {};
		await expect(
			decideCarryOver(officer, slug, { substanceId, materialId, leftOut: true, reason: 'None' })
		).rejects.toThrow(refusal('invalid'));
	});
});
