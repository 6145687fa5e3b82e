import type { Page } from '@playwright/test';
import { expect, expectAccessible, open, signIn, test, type RoleName } from './support/app';

/** Every page, as the role that has most to do on it. */
const PAGES: Readonly<Partial<Record<RoleName, readonly string[]>>> = {
	officer: [
		'/desk',
		'/products',
		'/products/new',
		'/products/nightfold-cream/formula',
		'/products/nightfold-cream/composition',
		'/products/nightfold-cream/list',
		'/products/nightfold-cream/claims',
		'/products/nightfold-cream/label',
		'/products/tidewell-shampoo/label',
		'/products/nightfold-cream/file',
		'/products/nightfold-cream/details',
		'/materials',
		'/materials/new',
		'/materials/import',
		'/materials/BW-GA20/1',
		'/formulas',
		'/formulas/new',
		'/formulas/F-0012/1',
		'/formulas/F-0002/1',
		'/formulas/F-0001/family',
		'/formulas/F-0012/compare',
		'/formulas/F-0012/1/batch',
		'/evidence',
		'/rules',
		'/rules/eu-1223-2009/art-19-1-g'
	],
	administrator: ['/people'],
	client: ['/counter', '/counter/nightfold-cream', '/account']
};
const NARROW = { width: 360, height: 740 };
const WIDE = { width: 1440, height: 900 };

/** A page of a phone is read downwards only; what is wider scrolls in a box of its own. */
async function expectNoSidewaysScroll(page: Page): Promise<void> {
	await page.setViewportSize(NARROW);
	const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
	expect(over, `${new URL(page.url()).pathname} at 360 px is too wide by`).toBeLessThanOrEqual(0);
	await page.setViewportSize(WIDE);
}

async function visit(page: Page, address: string): Promise<void> {
	await open(page, address);
	await expectAccessible(page);
	await expectNoSidewaysScroll(page);
}

test('the door has nothing that axe finds, and fits a phone', async ({ page }) => {
	for (const address of ['/sign-in', '/reset', '/invitation/no-such-link']) await visit(page, address);
});

/** A test's time is bounded, and each page is read by axe twice. */
const PAGES_A_TEST = 6;

for (const [role, addresses] of Object.entries(PAGES))
	for (let from = 0; from < addresses.length; from += PAGES_A_TEST)
		test(`no page of the ${role} has anything that axe finds, and all fit a phone (${from + 1} and on)`, async ({
			page,
			app
		}) => {
			test.setTimeout(180_000);
			await signIn(page, app.account(role as RoleName));
			for (const address of addresses.slice(from, from + PAGES_A_TEST)) await visit(page, address);
		});

test('the editors of a draft and an evidence page have nothing that axe finds, and fit a phone', async ({
	page,
	app
}) => {
	test.setTimeout(120_000);
	await signIn(page, app.account('formulator'));
	for (const address of ['/materials/BW-GA20/1', '/formulas/F-0012/1']) {
		await open(page, address);
		await page.getByRole('button', { name: 'New version' }).click();
		await expect(page.getByRole('heading', { level: 1 })).toContainText('draft 2');
		await visit(page, page.url());
	}
	await open(page, '/evidence');
	await page.getByRole('row').nth(1).getByRole('link').first().click();
	await expect(page).toHaveURL(/\/evidence\/./);
	await visit(page, page.url());
	await open(page, '/products/nightfold-cream/list?line=10');
	await page
		.locator('#margin')
		.getByRole('link', { name: /^Formula version \d+ released$/ })
		.click();
	await expect(page.getByText('a version was released')).toBeVisible();
	await visit(page, page.url());
});
