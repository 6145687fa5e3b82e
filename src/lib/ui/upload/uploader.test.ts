import { describe, expect, test, vi } from 'vitest';
import { FILE_LIMIT, fileFault, partsOf } from './rules';
import { Uploader } from './uploader.svelte';

const answer = (body: unknown, status = 200) => new Response(JSON.stringify(body), { status });
const file = (name: string, bytes: number) => new File([new Uint8Array(bytes)], name);

function deferred<T>() {
	let resolve!: (value: T) => void;
	const promise = new Promise<T>((done) => (resolve = done));
	return { promise, resolve };
}

/** A server that takes parts of 4 bytes. */
function server(on: (method: string, path: string) => Response | Promise<Response> | undefined = () => undefined) {
	const calls: string[] = [];
	const fetch = vi.fn(async (input: RequestInfo | URL, init: RequestInit = {}) => {
		const path = String(input);
		const method = init.method ?? 'GET';
		calls.push(`${method} ${path}`);
		init.signal?.throwIfAborted();
		const own = await on(method, path);
		if (own) return own;
		return path === '/api/uploads' ? answer({ id: 'u1', partBytes: 4 }, 201) : answer({ stored: true });
	});
	return { calls, fetch: fetch as typeof globalThis.fetch };
}

describe('what is refused before the first byte', () => {
	test.each([
		{ why: 'nothing in it', bytes: 0, fault: 'empty' },
		{ why: 'one byte', bytes: 1, fault: null },
		{ why: 'exactly the limit', bytes: FILE_LIMIT, fault: null },
		{ why: 'one byte over the limit', bytes: FILE_LIMIT + 1, fault: 'tooLarge' }
	])('$why', ({ bytes, fault }) => expect(fileFault(bytes)).toBe(fault));

	test('the server is not asked about a refused file', async () => {
		const { calls, fetch } = server();
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		await uploader.start([file('empty.pdf', 0)]);
		expect(uploader.uploads[0]?.state).toBe('refused');
		expect(calls).toEqual([]);
	});
});

test('parts cover a file without gap or overlap', () => {
	expect(partsOf(10, 4)).toEqual([
		{ number: 1, from: 0, to: 4 },
		{ number: 2, from: 4, to: 8 },
		{ number: 3, from: 8, to: 10 }
	]);
	expect(partsOf(8, 4)).toHaveLength(2);
});

describe('an upload', () => {
	test('goes part by part and is completed', async () => {
		const { calls, fetch } = server();
		const ondone = vi.fn();
		const uploader = new Uploader({ purpose: 'evidence', fetch, ondone });
		await uploader.start([file('report.pdf', 10)]);
		expect(calls).toEqual([
			'POST /api/uploads',
			'PUT /api/uploads/u1/parts/1',
			'PUT /api/uploads/u1/parts/2',
			'PUT /api/uploads/u1/parts/3',
			'POST /api/uploads/u1/complete'
		]);
		expect(uploader.uploads[0]).toMatchObject({ state: 'done', sent: 10, result: { stored: true } });
		expect(ondone).toHaveBeenCalledOnce();
	});
	test('a part that is lost is sent again', async () => {
		let lost = true;
		const { calls, fetch } = server((_, path) => {
			if (!path.endsWith('/parts/2') || !lost) return undefined;
			lost = false;
			throw new TypeError('network');
		});
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		await uploader.start([file('report.pdf', 10)]);
		expect(calls.filter((call) => call.endsWith('/parts/2'))).toHaveLength(2);
		expect(uploader.uploads[0]?.state).toBe('done');
	});
	test('a connection that stays away fails and leaves nothing behind', async () => {
		const { calls, fetch } = server((method) => {
			if (method === 'PUT') throw new TypeError('network');
			return undefined;
		});
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		await uploader.start([file('report.pdf', 10)]);
		expect(uploader.uploads[0]).toMatchObject({ state: 'failed', problem: { kind: 'lost' } });
		expect(calls.at(-1)).toBe('DELETE /api/uploads/u1');
	});
	test('a refusal by the server is told in its own words and not tried again', async () => {
		const { calls, fetch } = server((method) =>
			method === 'PUT' ? answer({ title: 'Too large', detail: 'report.pdf is too large.' }, 413) : undefined
		);
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		await uploader.start([file('report.pdf', 3)]);
		expect(uploader.uploads[0]?.problem).toEqual({ kind: 'said', text: 'report.pdf is too large.' });
		expect(calls.filter((call) => call.startsWith('PUT'))).toHaveLength(1);
	});
	test('a refusal by code keeps its data for the sentence', async () => {
		const { fetch } = server(() => answer({ message: 'x', code: 'file-too-large', data: { limit: '250 MiB' } }, 413));
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		await uploader.start([file('report.pdf', 3)]);
		expect(uploader.uploads[0]?.problem).toEqual({
			kind: 'refused',
			code: 'file-too-large',
			data: { limit: '250 MiB' }
		});
	});
	test('cancelling stops it, throws away what was sent, and the next file goes on', async () => {
		const gate = deferred<Response>();
		const reached = deferred<void>();
		let first = true;
		const { calls, fetch } = server((method, path) => {
			if (method !== 'PUT' || !path.endsWith('/parts/1') || !first) return undefined;
			first = false;
			reached.resolve();
			return gate.promise;
		});
		const uploader = new Uploader({ purpose: 'evidence', fetch });
		const whole = uploader.start([file('a.pdf', 10), file('b.pdf', 2)]);
		await reached.promise;
		await uploader.cancel(uploader.uploads[0]!);
		gate.resolve(answer({}));
		await whole;
		expect(uploader.uploads.map((upload) => upload.state)).toEqual(['cancelled', 'done']);
		expect(calls).toContain('DELETE /api/uploads/u1');
	});
});
