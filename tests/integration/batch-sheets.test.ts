import { execFileSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { batchRequestSchema } from '$lib/schemas/batch-sheet';
import { printBatchSheet, readBatchSheet } from '$lib/server/services/batch-sheets';
import { Workshop } from './support/label';

let owner: pg.Client;
let shop: Workshop;
const request = (more: object) => batchRequestSchema.parse(more);

beforeAll(async () => {
	owner = new pg.Client({ connectionString: process.env.DATABASE_OWNER_URL });
	await owner.connect();
	shop = await Workshop.open(owner);
	await shop.material('WATER', [{ inci: 'Aqua', typical: '100' }]);
	await shop.material('GLY', [{ inci: 'Glycerin', typical: '100' }]);
	await shop.formula('LOTION', [
		['GLY', '3.3333'],
		['WATER', 'rest']
	]);
});
afterAll(() => owner.end());

test('sums to the gram, with the rounding in the q.s. line', async () => {
	const { batch } = await readBatchSheet(shop.officer, 'LOTION', 1, request({ size: '1500', step: '1' }));
	// 1,500 g × 3.3333 % = 49.9995 g.
	expect(batch.lines.map(({ code, amount, exact }) => [code, amount, exact])).toEqual([
		['GLY', '50', '49.9995'],
		['WATER', '1450', '1450.0005']
	]);
	expect(batch.total).toBe('1500');
});

test('corrects a lot by its content, and the water gives way', async () => {
	const { batch } = await readBatchSheet(
		shop.officer,
		'LOTION',
		1,
		request({ size: '1000', step: '0.001', lots: { GLY: '99,5' } })
	);
	// 33.333 g ÷ 0.995 = 33.5005… g.
	expect(batch.lines.map(({ amount }) => amount)).toEqual(['33.501', '966.499']);
});

test('a size that is no whole number of steps is refused with the field', () => {
	expect(batchRequestSchema.safeParse({ size: '1000.005', step: '0.01' }).error?.issues).toMatchObject([
		{ path: ['size'], message: 'notWholeSteps' }
	]);
});

test('is printed with room for what was weighed', async () => {
	const { body, fileName } = await printBatchSheet(shop.officer, 'LOTION', 1, request({ size: '1500', step: '1' }));
	expect(fileName).toBe('LOTION_version-1_batch-1500-g.pdf');
	const file = path.join(mkdtempSync(path.join(tmpdir(), 'costmary-sheet-')), 'sheet.pdf');
	writeFileSync(file, body);
	const text = execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' });
	for (const word of ['Batch sheet, Formula LOTION', 'Trade GLY', '50', '1450', '1500', 'weighed, g'])
		expect(text).toContain(word);
});
