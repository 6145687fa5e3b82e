import type { Page } from '@playwright/test';
import { expect, expectAccessible, open, signIn, test } from './support/app';

const HEAD = 'material_code;trade_name;supplier;constituent;cas;min;typical;max;role;part_of';
const material = (code: string, ...rows: readonly string[]) =>
	rows.map((row, at) => (at === 0 ? `${code};Trade name ${code};Quillstone Extracts;${row}` : `;;;${row}`));

/** Ten rows that cannot be taken as they are, and what puts each right: row, column, text. */
const SHEET = [
	HEAD,
	...material('IM-1', 'Glycerin;56-81-4;;99.5;;;', 'Aqua;7732-18-5;;0.5;;;'),
	...material('IM-2', 'Aqua;;;1.000,5;;;', 'Glycerin;;;99;;;'),
	...material('IM-3', 'Aqua;;60;;70;;', 'Glycerin;;45;;50;;'),
	...material('im 4', 'Squalane;;;100;;;'),
	...material('IM-5', 'Aqua;;;98;;solvent;', 'Panthenol;;;2;;;'),
	...material('IM-6', 'Parfum;;;100;;;', 'Linalool;;;3;;of which;Perfume'),
	...material('IM-7', ';;;100;;;'),
	...material('IM-8', 'Aqua;;;101;;;'),
	...material('IM-9', 'Aqua;;80;;70;;', 'Glycerin;;;;;;'),
	...material('IM-10', 'Sodium Benzoate;532-32;;100;;;')
].join('\n');
const MENDS = [
	[2, 'cas', '56-81-5'],
	[4, 'typical', '1'],
	[6, 'min', '50'],
	[8, 'material code', 'IM-4'],
	[9, 'role', ''],
	[12, 'part of', 'Parfum'],
	[13, 'constituent', 'Jojoba Esters'],
	[14, 'typical', '100'],
	[15, 'min', '60'],
	[17, 'cas', '532-32-1']
] as const;

async function mend(page: Page, row: number, column: string, text: string): Promise<void> {
	await page.getByLabel(`Row ${row}, ${column}`).fill(text);
	await page.getByRole('button', { name: `Judge row ${row} again` }).click();
	await expect(page.getByLabel(`Row ${row}, ${column}`)).toHaveCount(0);
}

test('an import with ten faulty rows is mended and made', async ({ page, app }) => {
	test.setTimeout(120_000);
	await signIn(page, app.account('formulator'));
	await open(page, '/materials');
	await page.getByRole('link', { name: 'Import' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('Import of materials');
	await page
		.locator('input[type=file]')
		.setInputFiles({ name: 'supplier list.csv', mimeType: 'text/csv', buffer: Buffer.from(SHEET) });

	await expect(page.getByText('16 rows, 10 of them faulty.')).toBeVisible({ timeout: 30_000 });
	await expect(page.getByText('cas: “56-81-4” has a wrong check digit; 5 would be right.')).toBeVisible();
	await expect(page.getByText('The least figures together are 5 % above 100.')).toBeVisible();
	await expect(page.getByRole('button', { name: 'Make all' })).toBeDisabled();
	await expectAccessible(page);
	for (const [row, column, text] of MENDS) await mend(page, row, column, text);

	await expect(page.getByText('16 rows, all in order. 10 new materials')).toBeVisible();
	await page.getByRole('radio', { name: /^released/ }).check();
	await page.getByRole('button', { name: 'Make all' }).click();
	await expect(page.getByText('Made. The materials stand in the list.')).toBeVisible({ timeout: 30_000 });

	await open(page, '/materials/IM-3/1');
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 1');
	// 50 to 70 and 45 to 50 can only sum to 100 with water from 50 to 55.
	await expect(page.getByRole('row', { name: /Aqua/ })).toContainText('50–55');
	await expect(page.getByRole('link', { name: 'Composition sheet supplier list.csv' }).first()).toBeVisible();
});
