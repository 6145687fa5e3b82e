import AxeBuilder from '@axe-core/playwright';
import { expect, test as base, type Page, type TestInfo } from '@playwright/test';
import { closeSync, openSync } from 'node:fs';
import path from 'node:path';
import { accountsOf, type Account } from '../../../scripts/lib/data.mjs';
import { openFolder } from '../../../scripts/lib/env.mjs';
import { Processes } from '../../../scripts/lib/processes.mjs';
import { startWeb, startWorker } from '../../../scripts/lib/serve.mjs';
import { createDatabase, testVariable, type TestDatabase } from '../../integration/support/database';

export { expect };

/** What the copied workspace holds: the demo, or nothing but one administrator. */
export type Workspace = 'demo' | 'empty';
export type RoleName = 'officer' | 'formulator' | 'assessor' | 'administrator' | 'client';

export interface App {
	readonly address: string;
	readonly database: TestDatabase;
	readonly accounts: readonly Account[];
	/** The first account with this role, in the order in which the demo lists them. */
	account(role: RoleName): Account;
}

interface Running {
	readonly app: App;
	readonly key: string;
	readonly log: string;
	stop(): Promise<void>;
}

interface TestFixtures {
	workspace: Workspace;
	app: App;
	quietConsole: void;
}

interface WorkerFixtures {
	apps: (workspace: Workspace, info: TestInfo) => Promise<Running>;
}

const rolesOf = ({ roles, role }: Account): readonly string[] => roles ?? (role ? [role] : []);

function accountsIn(workspace: Workspace): readonly Account[] {
	if (workspace === 'demo') return accountsOf(path.join(testVariable('COSTMARY_TEST_FOLDER'), 'demo'));
	const email = testVariable('COSTMARY_ADMIN_EMAIL');
	return [{ email, password: testVariable('COSTMARY_ADMIN_PASSWORD'), roles: ['administrator'] }];
}

/** Starts an application and a job worker of their own on a copy of the workspace. */
async function startApp(processes: Processes, workspace: Workspace, key: string): Promise<Running> {
	const database = await createDatabase(`costmary_${workspace}`);
	const logs = openFolder(path.join(testVariable('COSTMARY_TEST_FOLDER'), 'logs'));
	const log = path.join(logs, `${database.name}.log`);
	const output = openSync(log, 'a');
	const stdio = ['ignore', output, output] satisfies ['ignore', number, number];
	const services = { DATABASE_URL: database.url('application'), DATABASE_OWNER_URL: database.url('owner') };
	const web = await startWeb(processes, services, { port: 0, stdio });
	const worker = startWorker(processes, web.env, stdio);
	closeSync(output);
	const accounts = accountsIn(workspace);
	const account = (role: RoleName): Account => {
		const found = accounts.find((each) => rolesOf(each).includes(role));
		if (!found) throw new Error(`The ${workspace} workspace has no account with the role ${role}.`);
		return found;
	};
	const stop = async () => {
		await processes.end(worker);
		await processes.end(web.child);
		await database.drop();
	};
	return { app: { address: web.address, database, accounts, account }, key, log, stop };
}

export const test = base.extend<TestFixtures, WorkerFixtures>({
	workspace: ['demo', { option: true }],

	// One application per test file: its tests share what they write, and no other file sees it.
	apps: [
		async ({ browserName: _ }, use) => {
			const processes = new Processes();
			let running: Running | null = null;
			await use(async (workspace, info) => {
				const key = `${workspace} ${info.file}`;
				if (running?.key === key) return running;
				await running?.stop();
				running = null;
				running = await startApp(processes, workspace, key);
				return running;
			});
			await (running as Running | null)?.stop();
			await processes.endAll();
		},
		{ scope: 'worker', timeout: 60_000 }
	],

	app: async ({ apps, workspace }, use, info) => {
		const { app, log } = await apps(workspace, info);
		await use(app);
		if (info.status !== info.expectedStatus) await info.attach('what the server said', { path: log });
	},

	baseURL: async ({ app }, use) => use(app.address),

	// A refused style or script, or an error in the page, shows only in the console; it fails the test that caused it.
	quietConsole: [
		async ({ page }, use) => {
			const said: string[] = [];
			page.on('pageerror', (error) => said.push(error.message));
			page.on('console', (message) => {
				// The browser reports every 4xx answer this way, also those a test asks for.
				const isAnswer = message.text().startsWith('Failed to load resource');
				if (message.type() === 'error' && !isAnswer) said.push(message.text());
			});
			await use();
			expect(said, 'errors in the browser console').toEqual([]);
		},
		{ auto: true }
	]
});

/** Opens a page and waits until its scripts are at work: a click before that would go nowhere. */
export async function open(page: Page, address: string): Promise<void> {
	await page.goto(address);
	await hydrated(page);
}

export async function hydrated(page: Page): Promise<void> {
	await page.locator('html[data-hydrated]').waitFor({ state: 'attached' });
}

export async function signIn(page: Page, account: Pick<Account, 'email' | 'password'>): Promise<void> {
	await open(page, '/sign-in');
	await page.locator('input[name="email"]').fill(account.email);
	await page.locator('input[name="password"]').fill(account.password);
	await page.locator('main form button[type="submit"]').click();
	await page.waitForURL((url) => url.pathname !== '/sign-in');
	await hydrated(page);
}

const THEMES = ['light', 'dark'] as const;

/** No finding of axe, in either theme. The theme is set on the page itself, so an open dialogue stays open. */
export async function expectAccessible(page: Page): Promise<void> {
	const setTheme = (theme: string | undefined) =>
		page.evaluate((value) => {
			const before = document.documentElement.dataset.theme;
			if (value !== undefined) document.documentElement.dataset.theme = value;
			return before;
		}, theme);
	const before = await setTheme(undefined);
	for (const theme of THEMES) {
		await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' });
		await setTheme(theme);
		const { violations } = await new AxeBuilder({ page }).analyze();
		const findings = violations.flatMap(({ id, nodes }) => nodes.map((node) => `${id}: ${node.html.slice(0, 160)}`));
		expect(findings, `accessibility of ${new URL(page.url()).pathname} in the ${theme} theme`).toEqual([]);
	}
	await setTheme(before);
}
