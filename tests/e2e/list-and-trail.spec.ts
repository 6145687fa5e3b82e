import { expect, open, signIn, test } from './support/app';

test('the formulator changes a weight; list and margin of the product move', async ({ page, app }) => {
	await signIn(page, app.account('formulator'));
	await open(page, '/formulas/F-0012');
	await page.getByRole('button', { name: 'New version' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 2');
	const squalane = page.getByRole('textbox', { name: 'Squalvane O, % w/w' });
	await squalane.fill('3,2');
	// 3.2 % squalane now outweighs 3.0 % propanediol: the margin shows it before anything is saved.
	await expect(page.locator('#margin')).toContainText('3.2');
	await page.getByRole('button', { name: 'Save the draft' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByRole('button', { name: 'Release formula 2' }).click();
	await page.getByRole('button', { name: 'Release 2', exact: true }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 2');

	await open(page, '/products/nightfold-cream/list');
	await expect(page.locator('[data-list-text]')).toContainText('Squalane, Propanediol');
	await page.locator('tr[data-row="Squalane"]').click();
	await expect(page.locator('#margin')).toContainText('Squalvane O');
	await expect(page.locator('#margin')).toContainText('3.2');
});

test('one name is walked by keyboard to the gram, the material and the rule', async ({ page, app }) => {
	await signIn(page, app.account('officer'));
	await open(page, '/products/nightfold-cream/list?line=10');
	const margin = page.locator('#margin');
	await expect(margin).toContainText('Phenoxyethanol');
	// 1.00 × 90 % + 2.00 × 0.8 % = 0.916 % (fact base, B.6, formula 1).
	await expect(margin).toContainText('0.916');
	await margin.getByRole('link', { name: 'Wardol 90', exact: true }).focus();
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/formulas\/F-0012\/\d+#line-/);
	await open(page, '/products/nightfold-cream/list?line=10');
	await margin.getByRole('link', { name: 'Wardol 90, version 1' }).focus();
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL('/materials/WD-90/1');
	await open(page, '/products/nightfold-cream/list?line=10');
	await margin.getByRole('link', { name: 'Reg. (EC) 1223/2009, Art. 19(1)(g)' }).first().focus();
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1 })).toHaveText(/List of ingredients/);
	await open(page, '/products/nightfold-cream/list?line=10');
	await margin.getByRole('link', { name: /^Formula version \d+ released$/ }).focus();
	await page.keyboard.press('Enter');
	await expect(page.getByText('a version was released')).toBeVisible();
});

test('a client sees own products and nothing of another client or the laboratory', async ({ page, app }) => {
	await signIn(page, app.account('client'));
	// The client of one product has nothing to choose and stands before it at once.
	await expect(page).toHaveURL('/counter/nightfold-cream');
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('Nightfold Cream');
	for (const address of [
		'/counter/tidewell-shampoo',
		'/products/nightfold-cream/list',
		'/materials',
		'/formulas/F-0012/1'
	]) {
		const response = await page.request.get(address);
		expect(response.status(), address).toBe(404);
	}
});
