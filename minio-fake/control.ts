import type { IncomingMessage, ServerResponse } from 'node:http';
import type { Uploads } from './multipart';
import { isProblemCode, Problem, type ProblemCode } from './problem';
import type { Store } from './store';

/** What the next matching call meets: an error answer, or a connection that is cut. */
export interface Failure {
	readonly code: ProblemCode | 'cut';
	/** Only calls of this method; any when left out. */
	readonly method?: string;
	/** How many calls in a row; one when left out. */
	readonly times?: number;
}

/** The test-only controls; the server offers them under /-/ only when it was told to. */
export class Control {
	readonly #store: Store;
	readonly #uploads: Uploads;
	#failure: Failure | null = null;
	#left = 0;

	constructor(store: Store, uploads: Uploads) {
		this.#store = store;
		this.#uploads = uploads;
	}

	failNext(failure: Failure): void {
		this.#failure = failure;
		this.#left = failure.times ?? 1;
	}

	async reset(): Promise<void> {
		this.#left = 0;
		await this.#uploads.clear();
		await this.#store.clear();
	}

	/** Called once per verified request. */
	meet(method: string, request: IncomingMessage): void {
		const failure = this.#failure;
		if (!failure || this.#left === 0 || (failure.method !== undefined && failure.method !== method)) return;
		this.#left -= 1;
		if (failure.code === 'cut') {
			request.socket.destroy();
			throw new Problem('ServiceUnavailable', 'The connection was cut on request.');
		}
		throw new Problem(failure.code, 'This call was told to fail.');
	}

	/** `GET /-/health`, `POST /-/reset`, `POST /-/fail-next?code=SlowDown&method=PUT&times=2`. */
	async answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
		const { pathname, searchParams } = new URL(request.url ?? '/', 'http://control.example');
		const call = `${request.method} ${pathname}`;
		if (call === 'POST /-/reset') await this.reset();
		else if (call === 'POST /-/fail-next') this.failNext(failureOf(searchParams));
		else if (call !== 'GET /-/health') throw new Problem('NotImplemented', `There is no control ${call}.`);
		response.writeHead(200, { 'content-type': 'application/json' });
		response.end(JSON.stringify({ ok: true, objects: this.#store.list().length }));
	}
}

function failureOf(parameters: URLSearchParams): Failure {
	const code = parameters.get('code') ?? '';
	if (code !== 'cut' && !isProblemCode(code)) throw new Problem('InvalidArgument', `There is no error code ${code}.`);
	const method = parameters.get('method');
	return { code, ...(method === null ? {} : { method }), times: Number(parameters.get('times') ?? '1') };
}
