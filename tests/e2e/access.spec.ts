import { readdirSync, readFileSync } from 'node:fs';
import { join, sep } from 'node:path';
import type { APIRequestContext, APIResponse } from '@playwright/test';
import { ACCESS, type AccessRow } from '../integration/access.table';
import { expect, signIn, test, type RoleName } from './support/app';

const COLUMNS: readonly (RoleName | 'nobody')[] = [
	'officer',
	'formulator',
	'assessor',
	'administrator',
	'client',
	'nobody'
];

function form(body: AccessRow['body']): Record<string, string> {
	if (!body || 'json' in body) return {};
	return 'payload' in body && typeof body.payload === 'object'
		? { payload: JSON.stringify(body.payload) }
		: (body as Record<string, string>);
}

async function call(request: APIRequestContext, row: AccessRow, origin: string): Promise<number> {
	const options = { maxRedirects: 0, headers: { origin } };
	if (row.call === 'GET') return (await request.get(row.address, options)).status();
	if (!row.call.startsWith('?/')) {
		const json = row.body && 'json' in row.body ? { data: row.body.json } : { form: form(row.body) };
		return (await request.fetch(row.address, { ...options, method: row.call, ...json })).status();
	}
	const action = row.call === '?/default' ? '' : `${row.address.includes('?') ? '&' : '?'}${row.call.slice(1)}`;
	const headers = { ...options.headers, 'x-sveltekit-action': 'true', accept: 'application/json' };
	return statusOf(await request.post(row.address + action, { ...options, headers, form: form(row.body) }));
}

/** An action tells its status inside the answer. */
async function statusOf(response: APIResponse): Promise<number> {
	const body: unknown = await response.json().catch(() => null);
	if (typeof body !== 'object' || body === null || !('status' in body)) return response.status();
	return Number(body.status);
}

test('every route stands in the access table with every action and verb', () => {
	const root = 'src/routes';
	const files = readdirSync(root, { recursive: true, encoding: 'utf8' }).filter((file) =>
		/\+(page\.server|server)\.ts$/.test(file)
	);
	const known = new Set(ACCESS.map(({ route, call }) => `${route} ${call}`));
	const missing = files.flatMap((file) => {
		const route = `/${file.split(sep).slice(0, -1).join('/')}`;
		const source = readFileSync(join(root, file), 'utf8');
		const verbs = [...source.matchAll(/export const (GET|POST|PUT|PATCH|DELETE)\b/g)].map(([, verb]) => verb);
		const block = source.split('export const actions = {')[1] ?? '';
		const actions = [...block.matchAll(/^\t(\w+):/gm)].map(([, name]) => `?/${name}`);
		const loads = /export const load\b/.test(source) ? ['GET'] : [];
		return [...verbs, ...actions, ...loads].map((each) => `${route} ${each}`).filter((each) => !known.has(each));
	});
	expect(missing).toEqual([]);
});

for (const [column, role] of COLUMNS.entries()) {
	test(`what ${role} may call`, async ({ page, app }) => {
		test.setTimeout(120_000);
		if (role !== 'nobody') await signIn(page, app.account(role));
		const answered: string[] = [];
		for (const row of ACCESS) {
			const status = await call(page.request, row, app.address);
			if (status !== row.answers[column])
				answered.push(`${row.call} ${row.address}: ${status}, not ${row.answers[column]}`);
		}
		expect(answered).toEqual([]);
	});
}
