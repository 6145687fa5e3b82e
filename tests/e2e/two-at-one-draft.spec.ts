import { expect, hydrated, open, signIn, test } from './support/app';

test('typing that a reload brings back meets what another has saved; both values wait for a choice', async ({
	page,
	app,
	browser,
	baseURL
}) => {
	await signIn(page, app.account('formulator'));
	await open(page, '/formulas/F-0012/1');
	await page.getByRole('button', { name: 'New version' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 2');
	await hydrated(page);
	const glycerin = page.getByRole('textbox', { name: 'Glycerin 99.5, % w/w' });
	await glycerin.fill('6');

	const other = await browser.newPage({ baseURL: baseURL ?? '' });
	await signIn(other, app.account('officer'));
	await open(other, '/formulas/F-0012/2');
	await other.getByRole('textbox', { name: 'Glycerin 99.5, % w/w' }).fill('4');
	await other.getByRole('textbox', { name: 'Squalvane O, % w/w' }).fill('2');
	await other.getByRole('button', { name: 'Save the draft' }).click();
	await expect(other.getByText('Saved.')).toBeVisible();
	await other.close();

	await page.reload();
	await hydrated(page);
	await expect(page.getByText('Somebody saved this draft in between.')).toBeVisible();
	// The line that only the other changed is theirs already.
	await expect(page.getByRole('textbox', { name: 'Squalvane O, % w/w' })).toHaveValue('2');
	await page.keyboard.press('Control+s');
	await expect(page.getByText('1 line waits for your choice')).toBeVisible();
	await page.getByRole('button', { name: 'Theirs: 4' }).click();
	await expect(glycerin).toHaveValue('4');
});

test('a pasted block goes to the lines it names exactly, by the column that sums to 100', async ({ page, app }) => {
	await signIn(page, app.account('formulator'));
	await open(page, '/formulas/F-0020/1');
	await page.getByRole('button', { name: 'New version' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 2');
	await hydrated(page);
	const amount = page.locator('input[data-amount]').first();
	await amount.focus();
	await amount.evaluate((input) => {
		const data = new DataTransfer();
		data.setData('text/plain', 'No\tMaterial\t% w/w\tg\n1\tGlycerin 99.5\t4\t40\n2\tGlycerin\t5\t50\n');
		input.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
	});
	await expect(page.getByText('Not found, and left out: Glycerin.')).toBeVisible();
	await expect(page.getByRole('textbox', { name: 'Glycerin 99.5, % w/w' })).toHaveValue('4');
	await expect(page.getByRole('rowheader', { name: /Avenwell/ })).toHaveCount(0);
});
