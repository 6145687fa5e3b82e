import path from 'node:path';
import { ESLint } from 'eslint';
import ts from 'typescript-eslint';
import svelte from 'eslint-plugin-svelte';
import { describe, expect, test } from 'vitest';
import { houseRules } from '../../scripts/lint/house-rules.js';

const ROOT = path.resolve(import.meta.dirname, '../..');

// Only the house's own rules, with parsers that need no type information: a planted file does not exist on disk.
const eslint = new ESLint({
	cwd: ROOT,
	overrideConfigFile: true,
	overrideConfig: [
		{ files: ['**/*.ts'], languageOptions: { parser: ts.parser } },
		...svelte.configs.base,
		{ files: ['**/*.svelte'], languageOptions: { parserOptions: { parser: ts.parser } } },
		...houseRules
	]
});

async function faultsOf(file: string, code: string): Promise<string[]> {
	const [result] = await eslint.lintText(code, { filePath: path.join(ROOT, file) });
	return (result?.messages ?? []).map((message) => message.ruleId ?? message.message);
}

const DIRECTION = 'house/import-direction';

describe('imports go one way', () => {
	test.each([
		['src/lib/domain/material/a.ts', "import { a } from '../../schemas/a';"],
		['src/lib/domain/material/a.ts', "import { a } from '$lib/server/config';"],
		['src/lib/domain/material/a.ts', "import type { A } from '$lib/reference/a';"],
		['src/lib/domain/material/a.ts', "import { readFileSync } from 'node:fs';"],
		['src/lib/domain/material/a.ts', "import { onMount } from 'svelte';"],
		['src/lib/domain/material/a.ts', "import { sql } from 'kysely';"],
		['src/lib/domain/material/a.ts', "import pg from 'pg';"],
		['src/lib/domain/material/a.ts', "import { z } from 'zod';"],
		['src/lib/domain/material/a.ts', "export { a } from '../../ui/a';"],
		['src/lib/domain/material/a.ts', "export * from '../../server/a';"],
		['src/lib/domain/material/a.ts', "const a = await import('$lib/ui/a');"],
		['src/lib/domain/material/a.ts', "type A = import('../../server/a').A;"],
		['src/lib/domain/material/a.ts', "const a = import.meta.glob('/templates/phrases/*.json');"],
		['src/lib/domain/material/a.test.ts', "import { a } from '../../server/a';"],
		['src/lib/reference/a.ts', "import { a } from '../server/a';"],
		['src/lib/reference/a.ts', "import { a } from '../ui/a';"],
		['src/lib/schemas/a.ts', "import { a } from '../reference/a';"],
		['src/lib/schemas/a.ts', "import { a } from '$lib/server/a';"],
		['src/lib/schemas/a.ts', "import { page } from '$app/state';"],
		['src/lib/server/services/a.ts', "import { a } from '$lib/ui/a';"],
		['src/lib/server/services/a.ts', "import { building } from '$app/environment';"],
		['src/lib/server/services/a.ts', "import { env } from '$env/dynamic/private';"],
		['src/lib/server/services/a.ts', "import { a } from '../../../routes/a';"],
		['src/lib/ui/a.ts', "import { a } from '$lib/server/a';"],
		['src/lib/ui/a.ts', "import { a } from '../reference/a';"],
		['src/lib/ui/a.ts', "import { env } from '$env/dynamic/public';"],
		['src/lib/ui/a.svelte', '<script lang="ts">import { a } from \'$lib/server/a\';</script>'],
		['src/routes/(bench)/a/+page.ts', "import { a } from '$lib/server/a';"],
		['src/routes/(bench)/a/+page.svelte', '<script lang="ts">import { a } from \'$lib/server/a\';</script>'],
		['src/routes/(bench)/a/Part.svelte', '<script lang="ts">import { a } from \'$lib/reference/a\';</script>'],
		['src/routes/(bench)/a/+page.server.ts', "import { a } from '$lib/reference/a';"],
		['templates/pdf/a.ts', "import { a } from '../../src/lib/server/a';"],
		['templates/pdf/a.ts', "import { a } from '$lib/domain/a';"],
		['migrations/0099_a.ts', "import { a } from '../src/lib/domain/a';"],
		['migrations/0099_a.ts', "import { a } from '$lib/domain/a';"],
		['migrations/0099_a.ts', "import { z } from 'zod';"],
		['minio-fake/a.ts', "import { a } from '../src/lib/server/a';"]
	])('%s may not say: %s', async (file, code) => {
		expect(await faultsOf(file, code)).toContain(DIRECTION);
	});

	test.each([
		['src/lib/domain/material/a.ts', "import { a } from '../quantity/a';"],
		['src/lib/domain/material/a.test.ts', "import { test } from 'vitest';\nimport { a } from './a';"],
		['src/lib/reference/a.ts', "import { a } from '../schemas/a';\nimport { z } from 'zod';"],
		['src/lib/schemas/a.ts', "import { a } from '$lib/domain/a';\nimport { z } from 'zod';"],
		['src/lib/server/services/a.ts', "import { a } from '../db/a';\nimport { b } from '$lib/domain/b';"],
		['src/lib/server/pdf/a.ts', "import { a } from '$templates/pdf/a';"],
		['src/lib/ui/a.svelte', '<script lang="ts">import { a } from \'$lib/domain/a\';</script>'],
		['src/lib/ui/a.ts', "import { page } from '$app/state';"],
		['src/routes/(bench)/a/+page.server.ts', "import { a } from '$lib/server/services/a';"],
		['src/routes/api/v1/a/+server.ts', "import { a } from '$lib/server/services/a';"],
		['src/hooks.server.ts', "import { a } from '$lib/server/a';"],
		['templates/pdf/a.ts', "import type { A } from '$lib/domain/a';"],
		['migrations/0099_a.ts', "import { sql } from 'kysely';"],
		['vite.config.ts', "import { defineConfig } from 'vite';"]
	])('%s may say: %s', async (file, code) => {
		expect(await faultsOf(file, code)).toEqual([]);
	});
});

describe('the domain is pure', () => {
	test.each([
		'const a = new Date();',
		'const a = Date();',
		'const a = Date.now();',
		'const a = Math.random();',
		"const a = parseFloat('1.5');",
		"const a = Number.parseFloat('1.5');",
		'const a = crypto.randomUUID();'
	])('refuses: %s', async (code) => {
		expect(await faultsOf('src/lib/domain/quantity/a.ts', code)).toEqual(['house/pure-domain']);
		expect(await faultsOf('src/lib/server/services/a.ts', code)).toEqual([]);
	});

	test('allows a day that is given', async () => {
		expect(await faultsOf('src/lib/domain/quantity/a.ts', "const a = new Date('2026-01-01');")).toEqual([]);
	});
});

describe('text stands in the catalogue', () => {
	test.each([
		'<p>Nothing here yet</p>',
		'<p>{"Nothing here yet"}</p>',
		'<p>{empty ? "Nothing here yet" : ""}</p>',
		'<p>{`${count} lines`}</p>',
		'<button aria-label="Close">×</button>',
		'<input placeholder="Search" />',
		'<input placeholder={"Search"} />',
		'<img alt="A leaf" src={leaf} />',
		'<Field label="Name" />'
	])('refuses: %s', async (code) => {
		expect(await faultsOf('src/lib/ui/patterns/A.svelte', code)).toEqual(['house/literal-text']);
	});

	test.each([
		'<p>{t.materials.title}</p>',
		'<p>{share} %</p>',
		'<button aria-label={t.close} class="bg-paper text-ink" type="button">×</button>',
		'<img alt="" src={leaf} />',
		'<style>p { color: red; }</style>'
	])('allows: %s', async (code) => {
		expect(await faultsOf('src/lib/ui/patterns/A.svelte', code)).toEqual([]);
	});
});

test.each(['<p style="color: red"></p>', '<p style:color={tone}></p>'])('no inline style: %s', async (code) => {
	expect(await faultsOf('src/lib/ui/patterns/A.svelte', code)).toEqual(['house/inline-style']);
});

describe('the environment is read in one place', () => {
	test.each(['const a = process.env.HOME;', "const a = process['env'];", 'const { env } = process;'])(
		'refuses: %s',
		async (code) => {
			expect(await faultsOf('src/lib/server/services/a.ts', code)).toEqual(['house/environment']);
			expect(await faultsOf('src/lib/server/config.ts', code)).toEqual([]);
			expect(await faultsOf('scripts/a.ts', code)).toEqual([]);
			expect(await faultsOf('playwright.config.ts', code)).toEqual([]);
		}
	);
});

describe('the database handle stays at home', () => {
	test.each([
		'const pool = new Pool({});',
		'const pool = new pg.Pool({});',
		'const db = new Kysely({});',
		"import { handle } from '$lib/server/db/pool';",
		"import { handle as connections } from '../db/pool';"
	])('refuses: %s', async (code) => {
		expect(await faultsOf('src/lib/server/services/a.ts', code)).toEqual(['house/database-handle']);
		expect(await faultsOf('src/lib/server/db/a.ts', code)).toEqual([]);
	});

	test('allows withActor', async () => {
		expect(await faultsOf('src/lib/server/services/a.ts', "import { withActor } from '../db/with-actor';")).toEqual([]);
	});
});
