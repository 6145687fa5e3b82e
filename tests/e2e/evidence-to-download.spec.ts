import { expect, expectAccessible, open, signIn, test } from './support/app';
import { pdfText } from './support/pdf';

const LIST_START = 'Aqua, Caprylic/Capric Triglyceride, Butyrospermum Parkii Butter, Glycerin';

test('the formulator attaches a report, the officer builds the file, and the list stands in it', async ({
	page,
	app
}) => {
	test.setTimeout(120_000);
	await signIn(page, app.account('formulator'));
	await open(page, '/products/nightfold-cream/file');
	await page.locator('tr[data-row="a9"]').click();
	await page.locator('#margin input[type="file"]').setInputFiles({
		name: 'Record of effects.txt',
		mimeType: 'text/plain',
		buffer: Buffer.from('No undesirable effect is known.\n')
	});
	await expect(page.locator('tr[data-row="a9"]')).toContainText('ready');

	await page.context().clearCookies();
	await signIn(page, app.account('officer'));
	await open(page, '/products/nightfold-cream/file');
	await expectAccessible(page);
	await page.getByRole('button', { name: 'Build the PDF' }).click();
	const file = page.getByRole('link', { name: 'File 1' });
	await expect(file).toBeVisible({ timeout: 60_000 });
	const [download] = await Promise.all([page.waitForEvent('download'), file.click()]);
	expect(download.suggestedFilename()).toMatch(/Pell-&-Fennick_Nightfold-Cream_product-file-1_\d{4}-\d{2}-\d{2}\.pdf/);
	const text = (await pdfText(await download.path())).replace(/\s+/g, ' ');
	expect(text).toContain('Nightfold Cream');
	expect(text).toContain(LIST_START);
	expect(text).toContain('Moisturises for 24 hours');
});

test('the client approves the copy that waits and downloads it without a mark', async ({ page, app }) => {
	const quay = app.accounts.find(({ email }) => email.startsWith('jonas.quay'));
	if (!quay) throw new Error('the demo has a second client');
	await signIn(page, quay);
	await expect(page).toHaveURL('/counter/tidewell-shampoo');
	await expectAccessible(page);
	await page.getByRole('button', { name: 'Approve copy 2' }).click();
	await expect(page.getByRole('button', { name: 'Approve copy 2' })).toHaveCount(0);
	await expect(page.getByText('Approved by Jonas Quay').first()).toBeVisible();
	const [download] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('link', { name: 'PDF' }).first().click()
	]);
	const text = await pdfText(await download.path());
	expect(text).toContain('Sodium Laureth Sulfate');
	expect(text).not.toMatch(/not for print/i);
});

test('a material version that turns two names makes the copies that print them out of date', async ({ page, app }) => {
	await signIn(page, app.account('formulator'));
	await open(page, '/materials/QX-CA1/1');
	await page.getByRole('button', { name: 'New version' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 2');
	// 5 % of the extract at 50 % instead of 60 % propanediol: 2.5 % stands after 2.6 % squalane.
	await page.getByRole('textbox', { name: 'Row 1, typical, %' }).fill('50');
	await page.getByRole('textbox', { name: 'Row 2, typical, %' }).fill('49');
	await page.getByRole('button', { name: 'Save the draft' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByRole('button', { name: 'Release', exact: true }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 2');

	await page.context().clearCookies();
	await signIn(page, app.account('officer'));
	await expect(page.getByRole('main')).toContainText('Nightfold Cream, label copy 2');
	await expect(page.getByRole('main')).toContainText('out of date');
	await expect(page.getByRole('row', { name: /Tidewell Shampoo.*out of date/ })).toHaveCount(0);
});
