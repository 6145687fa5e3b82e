import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { DRAFT_COPY, longFile } from '../../../../templates/pdf/testing/nightfold';
import { print } from './print';
import { PdfFailed, renderInChild, type ChildOptions } from './render-in-child';
import type { PdfRequest } from './request';
import { pagesOf } from './testing';

const creationDate = '2026-12-01T14:20:00Z';
const COPY: PdfRequest = { kind: 'label-copy', data: DRAFT_COPY, creationDate };
const OPTIONS: ChildOptions = {
	childPath: fileURLToPath(new URL('./child.ts', import.meta.url)),
	nodeArguments: ['--import', 'tsx'],
	timeoutMs: 60_000,
	maxOldSpaceMb: 256
};

const codeOf = (failing: Promise<unknown>) =>
	failing.then(
		() => null,
		(error: unknown) => (error instanceof PdfFailed ? error.code : error)
	);

describe('Rendering in a child process', { timeout: 90_000 }, () => {
	test('the child prints the same bytes as the parent would', async () => {
		expect(Buffer.compare(await renderInChild(COPY, OPTIONS), await print(COPY))).toBe(0);
	});

	test('sixty pages fit within the limits, and the progress is told', async () => {
		const told: number[] = [];
		const file = await renderInChild(
			{ kind: 'product-file', data: longFile(1700), creationDate },
			{ ...OPTIONS, onProgress: (progress) => progress.step === 'writing' && told.push(progress.percent) }
		);
		expect((await pagesOf(file)).length).toBeGreaterThanOrEqual(60);
		expect(told.at(-1)).toBe(100);
		expect(told).toEqual([...told].sort((left, right) => left - right));
	});

	test('a child that takes too long is killed', async () => {
		expect(await codeOf(renderInChild(COPY, { ...OPTIONS, timeoutMs: 1 }))).toBe('timedOut');
	});

	test('a child is killed when the caller no longer wants the file', async () => {
		const stop = new AbortController();
		const running = renderInChild(COPY, { ...OPTIONS, signal: stop.signal });
		stop.abort();
		expect(await codeOf(running)).toBe('cancelled');
		expect(await codeOf(renderInChild(COPY, { ...OPTIONS, signal: stop.signal }))).toBe('cancelled');
	});

	test('a child without the memory it needs says so', async () => {
		const request: PdfRequest = { kind: 'product-file', data: longFile(20_000), creationDate };
		expect(await codeOf(renderInChild(request, { ...OPTIONS, maxOldSpaceMb: 96 }))).toBe('outOfMemory');
	});

	test('a request that is no document is refused by the child', async () => {
		const request = { kind: 'label-copy', data: DRAFT_COPY, creationDate: 'yesterday' } as const;
		expect(await codeOf(renderInChild(request, OPTIONS))).toBe('badRequest');
	});

	test('an entry that is not there fails with its words', async () => {
		expect(await codeOf(renderInChild(COPY, { ...OPTIONS, childPath: '/nowhere/pdf-child.js' }))).toBe('failed');
	});

	test('a folder without faces fails with its words', async () => {
		expect(await codeOf(renderInChild(COPY, { ...OPTIONS, fontFolder: '/nowhere' }))).toBe('failed');
	});
});
