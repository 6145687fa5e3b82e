import pg from 'pg';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { formulaDraftSchema } from '$lib/schemas/formula';
import type { Actor } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';
import { createCopy, saveCopy, submitCopy } from '$lib/server/services/copies';
import { readFamily } from '$lib/server/services/formula-family';
import { compareVersions } from '$lib/server/services/formula-compare';
import { readImpact } from '$lib/server/services/formula-impact';
import {
	createFormula,
	draftFormula,
	readFormula,
	releaseFormula,
	saveFormulaDraft
} from '$lib/server/services/formulas';
import { readProductList } from '$lib/server/services/product-list';
import { today } from '$lib/server/clock';
import { filledDraft, Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
let officer: Actor;
let formulator: Actor;

interface LineOf {
	readonly code: string;
	readonly kind?: 'material' | 'formula';
	readonly percent?: string;
	readonly pinned?: number | null;
	readonly pinReason?: string;
}
/** A line without a percentage is q.s. */
const grid = (rev: number, lines: readonly LineOf[]) =>
	formulaDraftSchema.parse({
		rev,
		lines: lines.map((line) => ({ kind: 'material', ...line, id: newId(), qs: line.percent === undefined }))
	});
async function release(code: string, lines: readonly LineOf[]): Promise<void> {
	await createFormula(formulator, { code, name: `Formula ${code}` });
	await releaseFormula(formulator, code, 1, await saveFormulaDraft(formulator, code, 1, grid(1, lines)));
}
const BASE = [{ code: 'WATER' }, { code: 'GLY', percent: '4' }, { code: 'GUARD', percent: '1' }];
const bulk = (more: Partial<LineOf> = {}): LineOf => ({ code: 'BASE', kind: 'formula', ...more });
const textOf = async (slug: string) => (await readProductList(officer, slug, today())).list?.text;

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	({ officer, formulator } = shop);
	const [pell, quay] = [await shop.client('Pell and Fennick'), await shop.client('Harrow Quay')];
	for (const [code, inci] of [
		['WATER', 'Aqua'],
		['GLY', 'Glycerin'],
		['UREA', 'Urea'],
		['BET', 'Betaine'],
		['GUARD', 'Phenoxyethanol']
	] as const)
		await shop.material(code, [{ inci, typical: '100' }]);
	await release('BASE', BASE);
	await release('VAR-UREA', [bulk(), { code: 'UREA', percent: '4.2' }]);
	await release('VAR-BET', [bulk(), { code: 'BET', percent: '12' }]);
	await release('VAR-PIN', [
		bulk({ pinned: 1, pinReason: 'Stability runs until June.' }),
		{ code: 'UREA', percent: '1' }
	]);
	await shop.product(pell, 'Urea Lotion', 'VAR-UREA');
	await shop.product(quay, 'Betaine Lotion', 'VAR-BET');
	await shop.product(quay, 'Pinned Lotion', 'VAR-PIN');
});
afterAll(() => owner.end());

describe('a base and three variants', () => {
	test('stand side by side, and each addition dilutes the preservative', async () => {
		const { columns, byIngredient } = await readFamily(officer, 'BASE');
		expect(columns.map(({ code, baseShare, pinned }) => [code, baseShare, pinned])).toEqual([
			['BASE', null, null],
			['VAR-BET', '88', null],
			['VAR-PIN', '99', 1],
			['VAR-UREA', '95.8', null]
		]);
		// 1 % × 88 % = 0.88 %, × 99 % = 0.99 %, × 95.8 % = 0.958 %.
		expect(byIngredient.find(({ name }) => name === 'Phenoxyethanol')).toMatchObject({
			inBase: true,
			now: ['1', '0.88', '0.99', '0.958']
		});
		expect(byIngredient.find(({ name }) => name === 'Urea')).toMatchObject({
			inBase: false,
			now: [null, null, '1', '4.2']
		});
	});

	test('the draft of a base shows what it would move, and a pinned variant stays', async () => {
		await draftFormula(formulator, 'BASE');
		await saveFormulaDraft(
			formulator,
			'BASE',
			2,
			grid(1, [{ code: 'WATER' }, { code: 'GLY', percent: '4.5' }, { code: 'GUARD', percent: '1' }])
		);
		const { byIngredient, draft } = await readFamily(officer, 'BASE');
		expect(draft).toBe(2);
		// 4.5 % × 88 % = 3.96 %, × 95.8 % = 4.311 %.
		expect(byIngredient.find(({ name }) => name === 'Glycerin')?.then).toEqual(['4.5', '3.96', null, '4.311']);
	});

	test('releasing it is told before and done after: the list that turns, the copy that prints it, nothing else', async () => {
		const slugs = ['urea-lotion', 'betaine-lotion', 'pinned-lotion'] as const;
		for (const slug of slugs) {
			const id = await createCopy(officer, slug, await shop.packOf(slug), 'EU');
			await saveCopy(officer, slug, id, filledDraft());
			await submitCopy(officer, slug, id, '');
		}
		// Urea 4.2 % against glycerin 3.832 %: it stands first now, and second at 4.311 %.
		expect(await textOf('urea-lotion')).toBe('Aqua, Urea, Glycerin, Phenoxyethanol');
		const told = await readImpact(formulator, 'BASE');
		const view = told.products.map(({ slug, moves, copies }) => [slug, moves, copies.map((copy) => copy.moves)]);
		expect(new Map(view.map(([slug, ...rest]) => [slug, rest]))).toEqual(
			new Map([
				['urea-lotion', [true, [true]]],
				['betaine-lotion', [false, [false]]],
				['pinned-lotion', [false, [false]]]
			])
		);
		const { version } = await readFormula(formulator, 'BASE', 2);
		const { effects } = await releaseFormula(formulator, 'BASE', 2, version.rev);
		expect(effects.filter(({ effect }) => effect !== 'untouched').map(({ productSlug }) => productSlug)).toEqual([
			'urea-lotion'
		]);
		expect(await textOf('urea-lotion')).toBe('Aqua, Glycerin, Urea, Phenoxyethanol');
	});

	test('a supplier’s new preservative moves every variant that follows, with its dilution', async () => {
		await shop.material(
			'GUARD',
			[
				{ inci: 'Phenoxyethanol', typical: '90' },
				{ inci: 'Ethylhexylglycerin', typical: '10' }
			],
			false
		);
		for (const slug of ['urea-lotion', 'betaine-lotion', 'pinned-lotion'])
			expect(await textOf(slug), slug).toContain('Phenoxyethanol, Ethylhexylglycerin');
		const { byIngredient } = await readFamily(officer, 'BASE');
		// 1 % × 10 % × 88 %, 99 %, 95.8 %.
		expect(byIngredient.find(({ name }) => name === 'Ethylhexylglycerin')?.now).toEqual([
			'0.1',
			'0.088',
			'0.099',
			'0.0958'
		]);
	});
});

test('a formula may hold two versions of one bulk, each by its own figures', async () => {
	// Half of base 1 (4 % glycerol) and half of base 2 (4.5 %): 2 + 2.25 = 4.25 %.
	await release('BOTH', [bulk(), bulk({ percent: '50', pinned: 1, pinReason: 'Old stock.' })]);
	const { columns, byIngredient } = await readFamily(officer, 'BASE');
	const at = columns.findIndex(({ code }) => code === 'BOTH');
	expect(byIngredient.find(({ name }) => name === 'Glycerin')?.now[at]).toBe('4.25');
});

test('two versions of the base are compared by line, by ingredient and by list', async () => {
	const view = await compareVersions(officer, 'BASE', 1, 2);
	expect(view.lines.filter(({ a, b }) => a !== b)).toMatchObject([{ key: 'GLY', a: '4', b: '4.5' }]);
	expect(view.ingredients.find(({ name }) => name === 'Aqua')).toMatchObject({ a: '95', b: '94.5' });
	expect(view.lists.a).toBe(view.lists.b);
});

test('a bulk that contains itself is refused with the path named', async () => {
	await release('LOOP', [{ code: 'WATER' }]);
	await release('LOOP-OUTER', [{ code: 'LOOP', kind: 'formula' }]);
	await draftFormula(formulator, 'LOOP');
	const rev = await saveFormulaDraft(formulator, 'LOOP', 2, grid(1, [{ code: 'LOOP-OUTER', kind: 'formula' }]));
	await expect(releaseFormula(formulator, 'LOOP', 2, rev)).rejects.toThrow(
		expect.objectContaining({
			code: 'blocked',
			data: { faults: [expect.objectContaining({ kind: 'cycle', path: ['LOOP', 'LOOP-OUTER', 'LOOP'] })] }
		})
	);
});

test('a pin without a reason, or to a version that is not released, is refused', async () => {
	await createFormula(formulator, { code: 'PIN', name: 'Pin' });
	const parse = (more: Partial<LineOf>) =>
		formulaDraftSchema.safeParse({ ...grid(1, [bulk()]), lines: [{ ...grid(1, [bulk()]).lines[0], ...more }] });
	expect(parse({ pinned: 1 }).error?.issues).toMatchObject([
		{ path: ['lines', 0, 'pinReason'], message: 'pinReasonMissing' }
	]);
	await expect(
		saveFormulaDraft(formulator, 'PIN', 1, grid(1, [bulk({ pinned: 9, pinReason: 'Stock' })]))
	).rejects.toThrow(
		expect.objectContaining({
			code: 'invalid',
			data: { faults: [{ path: 'lines.0.pinned', value: '9', why: 'unknownVersion', limit: null }] }
		})
	);
});
