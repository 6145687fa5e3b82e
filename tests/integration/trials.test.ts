import pg from 'pg';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { trialSchema } from '$lib/schemas/trial';
import { readFormula } from '$lib/server/services/formulas';
import { continueTrial, recordTrial } from '$lib/server/services/trials';
import { Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
const trial = (more: object = {}) => trialSchema.parse({ madeOn: '2026-11-20', verdict: 'good', ...more });
const amounts = async (code: string, number: number) =>
	(await readFormula(shop.formulator, code, number)).lines.map(({ code: material, percent }) => [material, percent]);

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	await shop.material('WATER', [{ inci: 'Aqua', typical: '100' }]);
	await shop.material('GLY', [{ inci: 'Glycerin', typical: '100' }]);
	await shop.formula('TRIED', [
		['GLY', '5'],
		['WATER', 'rest']
	]);
});
afterAll(() => owner.end());

test('a trial keeps its figures and its lines, and becomes the next version', async () => {
	expect(
		await recordTrial(shop.formulator, 'TRIED', 1, trial({ ph: '5,4', viscosity: '12000', remark: 'Soft.' }))
	).toBe(1);
	await shop.formula(
		'TRIED',
		[
			['GLY', '9'],
			['WATER', 'rest']
		],
		false
	);
	const { trials } = await readFormula(shop.formulator, 'TRIED', 2);
	expect(trials).toMatchObject([
		{ number: 1, madeOn: '2026-11-20', ph: '5.40', viscosity: '12000.00', verdict: 'good', remark: 'Soft.', lines: 2 }
	]);
	expect(await continueTrial(shop.formulator, 'TRIED', 1)).toBe(3);
	expect(await amounts('TRIED', 3)).toEqual([
		['GLY', '5'],
		['WATER', '']
	]);
});

test('going on from a trial puts its lines into the draft that is open', async () => {
	expect(await recordTrial(shop.formulator, 'TRIED', 2, trial({ verdict: 'nearly' }))).toBe(2);
	expect(await continueTrial(shop.formulator, 'TRIED', 2)).toBe(3);
	expect(await amounts('TRIED', 3)).toEqual([
		['GLY', '9'],
		['WATER', '']
	]);
});

test('a pH beyond 14 or a viscosity in words is refused with its field', () => {
	expect(trialSchema.safeParse({ madeOn: '2026-11-20', ph: '14.01' }).error?.issues).toMatchObject([{ path: ['ph'] }]);
	expect(trialSchema.safeParse({ madeOn: '2026-11-20', viscosity: 'thick' }).error?.issues).toMatchObject([
		{ path: ['viscosity'] }
	]);
});

test('a trial is neither changed nor removed, not even by the owner’s application', async () => {
	const application = new pg.Client({ connectionString: process.env.DATABASE_URL });
	await application.connect();
	await expect(application.query(`update trial set verdict = 'no'`)).rejects.toThrow(/permission denied/);
	await expect(application.query('delete from trial')).rejects.toThrow(/permission denied/);
	await application.end();
});
