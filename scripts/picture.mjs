import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { ensureBuilt } from './lib/build.mjs';
import { accountsOf, seed } from './lib/data.mjs';
import { checkNode, openFolder, ROOT, say, Stop } from './lib/env.mjs';
import { ensureDebianPackages, ensureNodeModules, TO_TEST } from './lib/install.mjs';
import { makeDatabase } from './lib/postgres.mjs';
import { runCommand } from './lib/processes.mjs';
import { startWeb } from './lib/serve.mjs';
import { startTestServices, testFolder } from './lib/test-services.mjs';

/** Takes the picture of the README from the demo, on services of its own. */
const PICTURE = path.join(ROOT, 'scripts', 'pictures', 'product-page.png');
const DATABASE = 'costmary_picture';
const CHROMIUM = { executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-gpu'] };
/** The line whose reasons stand in the margin: a name that two materials bring in. */
const ADDRESS = '/products/nightfold-cream/list?line=10';

await runCommand(async (processes) => {
	checkNode();
	await ensureNodeModules(processes);
	await ensureDebianPackages(processes, TO_TEST);
	await ensureBuilt(processes, ['web', 'worker']);
	const folder = testFolder(processes);
	const { cluster, services } = await startTestServices(processes, folder);
	await makeDatabase(cluster, DATABASE, 'costmary_template');
	const own = openFolder(path.join(folder, 'picture'));
	const urls = {
		DATABASE_URL: cluster.url('application', DATABASE),
		DATABASE_OWNER_URL: cluster.url('owner', DATABASE)
	};
	await seed(processes, { ...services, ...urls }, own, { empty: false });
	const web = await startWeb(processes, { ...services, ...urls }, { port: 0 });
	await takePicture(web.address, officerOf(own));
	say(`Written: ${path.relative(ROOT, PICTURE)}`);
	return 0;
});

/** @param {string} folder */
function officerOf(folder) {
	const officer = accountsOf(folder).find(({ roles }) => roles?.includes('officer'));
	if (!officer) throw new Stop('The demo has no officer.');
	return officer;
}

/** @param {string} address @param {{ email: string, password: string }} account */
async function takePicture(address, { email, password }) {
	// Not installed before ensureNodeModules has run.
	const { chromium } = await import('@playwright/test');
	const browser = await chromium.launch(CHROMIUM);
	try {
		const page = await browser.newPage({ viewport: { width: 1440, height: 1000 }, baseURL: address });
		await page.goto('/sign-in');
		await page.locator('input[name="email"]').fill(email);
		await page.locator('input[name="password"]').fill(password);
		await page.locator('main form button[type="submit"]').click();
		await page.waitForURL((url) => url.pathname !== '/sign-in');
		await page.goto(ADDRESS);
		await page.locator('html[data-hydrated]').waitFor({ state: 'attached' });
		mkdirSync(path.dirname(PICTURE), { recursive: true });
		await page.screenshot({ path: PICTURE });
	} finally {
		await browser.close();
	}
}
