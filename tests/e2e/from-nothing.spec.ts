import type { Page } from '@playwright/test';
import { expect, hydrated, open, signIn, test } from './support/app';
import { linkMailedTo } from './support/mail';
import { checkPdf, pdfText } from './support/pdf';

test.use({ workspace: 'empty' });

const PASSWORD = 'a-leaf-between-two-pages';
const OFFICER = { email: 'officer@laboratory.example', password: PASSWORD };
const CLIENT = { email: 'client@brand.example', password: PASSWORD };

async function addPerson(page: Page, name: string, email: string, belongs: { role: string } | { client: string }) {
	await page.getByRole('textbox', { name: 'Name', exact: true }).fill(name);
	await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
	await page.getByLabel('First password').fill(PASSWORD);
	if ('role' in belongs) await page.getByRole('checkbox', { name: belongs.role }).check();
	else await page.getByLabel('Or the client this person belongs to').selectOption(belongs.client);
	await page.getByRole('button', { name: 'Add a person' }).click();
	await expect(page.getByRole('row', { name: new RegExp(email) })).toBeVisible();
}

type Row = readonly [inci: string, cas: string, typical: string];

async function addMaterial(page: Page, code: string, name: string, rows: readonly Row[]) {
	await open(page, '/materials/new');
	await page.getByLabel('Code').fill(code);
	await page.getByLabel('Trade name').fill(name);
	await page.getByLabel('Supplier').fill('Alder Supply');
	await page.getByRole('button', { name: 'Create the material' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 1');
	await hydrated(page);
	for (const [index, [inci, cas, typical]] of rows.entries()) {
		const row = `Row ${index + 1}`;
		const field = page.getByRole('textbox', { name: `${row}, Constituent` });
		if ((await field.count()) === 0) await page.getByRole('button', { name: 'Add a constituent' }).click();
		await field.fill(inci);
		await page.getByRole('textbox', { name: `${row}, CAS number` }).fill(cas);
		await page.getByRole('textbox', { name: `${row}, typical, %` }).fill(typical);
	}
	await page.getByRole('button', { name: 'Save the draft' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByRole('button', { name: 'Release', exact: true }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 1');
}

async function addLine(page: Page, code: string) {
	const search = page.getByRole('combobox', { name: 'Add a material: type a name, code or INCI' });
	await search.fill(code);
	await page.getByRole('option', { name: new RegExp(code) }).click();
}

/** One walk through the whole job; each part stands on what the one before it left. */
test.describe.configure({ mode: 'serial' });

test('the administrator adds the client and the people', async ({ page, app }) => {
	await signIn(page, app.account('administrator'));
	await page.getByRole('navigation').getByRole('link', { name: 'People' }).first().click();
	await hydrated(page);
	await page.getByLabel('Name of the client').fill('Larch & Rowe');
	await page.getByRole('button', { name: 'Add a client' }).click();
	await expect(page.getByRole('listitem').filter({ hasText: 'Larch & Rowe' })).toBeVisible();
	await addPerson(page, 'Olive Stander', OFFICER.email, { role: 'regulatory officer' });
	await addPerson(page, 'Rowan Larch', CLIENT.email, { client: 'Larch & Rowe' });
});

test('somebody who is invited by mail chooses a password and is in', async ({ page, app }) => {
	const email = 'invited@laboratory.example';
	await signIn(page, app.account('administrator'));
	await open(page, '/people');
	await page.getByRole('textbox', { name: 'Name', exact: true }).fill('Linden Ash');
	await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
	await page.getByRole('checkbox', { name: 'formulator' }).check();
	await page.getByRole('button', { name: 'Add a person' }).click();
	await expect(page.getByRole('row', { name: new RegExp(email) })).toBeVisible();
	await page.context().clearCookies();

	const link = await linkMailedTo(email);
	await open(page, link);
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('Welcome, Linden Ash');
	await page.getByLabel('New password').fill('short');
	await page.getByRole('button', { name: 'Set the password' }).click();
	await expect(page.getByText('The password has 5 characters')).toBeVisible();
	await page.getByLabel('New password').fill(PASSWORD);
	await page.getByRole('button', { name: 'Set the password' }).click();
	await expect(page).toHaveURL('/desk');
	await open(page, link);
	await expect(page.getByRole('heading', { level: 1 })).toHaveText('This link no longer works');
});

test('two materials, one formula and one product give a list', async ({ page }) => {
	test.setTimeout(120_000);
	await signIn(page, OFFICER);
	await addMaterial(page, 'WATER', 'Purified water', [['Aqua', '7732-18-5', '100']]);
	await addMaterial(page, 'GLY-80', 'Glycerol eighty', [
		['Glycerin', '56-81-5', '80,5'],
		['Aqua', '7732-18-5', '19,5']
	]);
	await open(page, '/formulas/new');
	await page.getByLabel('Code').fill('F-1');
	await page.getByLabel('Name').fill('Plain lotion');
	await page.getByRole('button', { name: 'Create the formula' }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 1');
	await hydrated(page);
	await addLine(page, 'WATER');
	await addLine(page, 'GLY-80');
	await page.getByRole('checkbox', { name: 'Line 1, q.s. to 100' }).check();
	await page.getByRole('textbox', { name: 'Glycerol eighty, % w/w' }).fill('60');
	await page.getByRole('button', { name: 'Save the draft' }).click();
	await expect(page.getByText('Saved.')).toBeVisible();
	await page.getByRole('button', { name: 'Release formula 1' }).click();
	await page.getByRole('button', { name: 'Release 1', exact: true }).click();
	await expect(page.getByRole('heading', { level: 1 })).toContainText('version 1');

	await open(page, '/products/new');
	await page.getByLabel('Client', { exact: true }).selectOption('Larch & Rowe');
	await page.getByLabel('Formula', { exact: true }).selectOption('F-1, Plain lotion');
	await page.getByLabel('Name', { exact: true }).fill('Plain Lotion');
	await page.getByLabel('Brand name').fill('Larch & Rowe');
	await page.getByLabel('Function, as it may stand on the pack').fill('Body lotion');
	await page.getByLabel('Product type').selectOption('body-lotion');
	await page.getByLabel('Responsible person in the EU').fill('Larch & Rowe SARL');
	await page.getByLabel('Address at which the file is kept').fill('1 rue du Bouleau, 75000 Paris, France');
	await page.getByLabel('Pack', { exact: true }).fill('200 ml bottle');
	await page.getByLabel('Content', { exact: true }).fill('200');
	await page.getByRole('button', { name: 'Create the product' }).click();
	// Water: 40 + 60 × 0.195 = 51.7 %; glycerol: 60 × 0.805 = 48.3 % (own arithmetic).
	await expect(page.locator('[data-list-text]')).toContainText('Aqua, Glycerin');
	await hydrated(page);
	await page.locator('tr[data-row="Glycerin"]').click();
	await expect(page.locator('#margin')).toContainText('48.3');
});

test('the copy is written, submitted, approved on both sides and put in use', async ({ page }) => {
	await signIn(page, OFFICER);
	await open(page, '/products/plain-lotion/label');
	await page.getByRole('button', { name: 'Begin a copy' }).click();
	await page.getByLabel('Durability', { exact: true }).selectOption('periodAfterOpening');
	await page.getByLabel('Months').fill('12');
	await page.getByLabel('Where the batch is printed').fill('See bottom');
	await page.getByLabel('Directions').fill('Apply to dry skin.');
	await page.getByRole('button', { name: 'Save', exact: true }).click();
	await expect(page.getByRole('row', { name: /Durability/ })).toContainText('12 M');
	await page.getByRole('button', { name: 'Submit for review' }).click();
	await page.getByRole('button', { name: 'Approve for the laboratory' }).click();
	await expect(page.getByText('The client approves next, on their own page.')).toBeVisible();

	await page.context().clearCookies();
	await signIn(page, CLIENT);
	await expect(page).toHaveURL('/counter/plain-lotion');
	await page.getByRole('button', { name: 'Approve copy 1' }).click();
	await expect(page.getByText('Approved by Rowan Larch').first()).toBeVisible();
	await expect(page.getByRole('button', { name: 'Approve copy 1' })).toHaveCount(0);
	const [copy] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('link', { name: 'PDF' }).first().click()
	]);
	expect(await pdfText(await copy.path())).toContain('Aqua, Glycerin');

	// Going back after the approval shows what stands, and a second approval changes nothing.
	await open(page, '/counter');
	await page.goBack();
	await expect(page.getByRole('button', { name: 'Approve copy 1' })).toHaveCount(0);
});

test('the file is built although it is far from ready, and prints the list and what is missing', async ({ page }) => {
	await signIn(page, OFFICER);
	await open(page, '/products/plain-lotion/file');
	await page.getByRole('button', { name: 'Build the PDF' }).click();
	const file = page.getByRole('link', { name: 'File 1' });
	await expect(file).toBeVisible({ timeout: 60_000 });
	const [download] = await Promise.all([page.waitForEvent('download'), file.click()]);
	const built = await download.path();
	await checkPdf(built);
	const text = (await pdfText(built)).replace(/\s+/g, ' ');
	expect(text).toContain('Plain Lotion');
	expect(text).toContain('Aqua, Glycerin');
	expect(text).toContain('missing');
});
