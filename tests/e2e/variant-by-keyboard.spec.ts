import type { Locator, Page } from '@playwright/test';
import { expect, hydrated, open, signIn, test } from './support/app';

const MOST_STOPS = 120;

/** Presses Tab until the element has the focus, as somebody without a mouse would. */
async function tabTo(page: Page, wanted: Locator): Promise<void> {
	for (let stop = 0; stop < MOST_STOPS; stop += 1) {
		if (await wanted.evaluate((element) => element === document.activeElement)) return;
		await page.keyboard.press('Tab');
	}
	throw new Error('no number of Tabs leads there');
}

async function addLine(page: Page, typed: string): Promise<void> {
	await tabTo(page, page.getByRole('combobox', { name: 'Add a material: type a name, code or INCI' }));
	await page.keyboard.type(typed);
	await expect(page.getByRole('option', { name: new RegExp(typed) }).first()).toBeVisible();
	await page.keyboard.press('Enter');
	await expect(page.getByRole('rowheader', { name: new RegExp(typed) })).toBeVisible();
}

test('a variant of a base is made and released by keyboard alone', async ({ page, app }) => {
	test.setTimeout(120_000);
	await signIn(page, app.account('formulator'));
	await open(page, '/formulas/new');
	await tabTo(page, page.getByLabel('Code'));
	await page.keyboard.type('F-0009');
	await page.keyboard.press('Tab');
	await page.keyboard.type('Lotion with urea');
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 1');
	await hydrated(page);

	await addLine(page, 'F-0001');
	await addLine(page, 'OAT-1');
	await page.locator('body').press('Home');
	await tabTo(page, page.getByRole('checkbox', { name: 'Line 1, q.s. to 100' }));
	await page.keyboard.press('Space');
	await tabTo(page, page.locator('input[data-amount]'));
	await page.keyboard.type('4,5');
	await page.keyboard.press('Control+s');
	await expect(page.getByText('Saved.')).toBeVisible();
	await tabTo(page, page.getByRole('button', { name: 'Release formula 1' }));
	await page.keyboard.press('Enter');
	await expect(page.getByText('No product rests on this formula.')).toBeVisible();
	await tabTo(page, page.getByRole('button', { name: 'Release 1', exact: true }));
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 1');

	await open(page, '/formulas/F-0001/family');
	// 100 − 4.5 % oat leaves 95.5 % of the base.
	await expect(page.getByRole('columnheader', { name: /Lotion with urea/ })).toContainText('95.5 % base, follows');
});
