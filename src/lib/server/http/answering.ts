import { error, fail, type ActionFailure } from '@sveltejs/kit';
import { message, type SuperValidated } from 'sveltekit-superforms';
import { Refused, type RefusalCode } from '../refused';

/** The one place where a refusal becomes a status. */
const STATUS = {
	'not-found': 404,
	forbidden: 403,
	invalid: 422,
	conflict: 409,
	exists: 409,
	frozen: 409,
	blocked: 409,
	'wrong-state': 409,
	'too-many-attempts': 429,
	'wrong-credentials': 400,
	'file-too-large': 413,
	'file-empty': 422,
	'upload-broken': 409,
	'kind-not-taken': 415
} as const satisfies Record<RefusalCode, number>;

export const statusOf = (code: RefusalCode) => STATUS[code];

/** For loads: a refusal becomes Kit's error page with the code that its sentence is looked up by. */
export async function orError<T>(fn: () => Promise<T>): Promise<T> {
	try {
		return await fn();
	} catch (thrown) {
		if (thrown instanceof Refused) {
			error(statusOf(thrown.code), { message: thrown.code, code: thrown.code, data: thrown.data });
		}
		throw thrown;
	}
}

type Form = SuperValidated<Record<string, unknown>, App.Superforms.Message>;

/** For form actions with a superform: what was typed goes back with the refusal. */
export async function answering<F extends Form, T>(
	form: F,
	fn: () => Promise<T>
): Promise<{ form: F; result: T } | ActionFailure<{ form: F }>> {
	try {
		return { form, result: await fn() };
	} catch (thrown) {
		if (!(thrown instanceof Refused)) throw thrown;
		const refusal: App.Superforms.Message = { kind: 'refused', code: thrown.code, data: thrown.data };
		return message(form as Form, refusal, { status: statusOf(thrown.code) }) as unknown as ActionFailure<{ form: F }>;
	}
}

export interface RefusedAction {
	refused: { code: RefusalCode; data: Record<string, unknown> };
}

/** For actions that are a single button. */
export async function answeringPlain<T>(fn: () => Promise<T>): Promise<{ result: T } | ActionFailure<RefusedAction>> {
	try {
		return { result: await fn() };
	} catch (thrown) {
		if (!(thrown instanceof Refused)) throw thrown;
		return fail(statusOf(thrown.code), { refused: { code: thrown.code, data: { ...thrown.data } } });
	}
}

export interface ProblemEntry {
	readonly path: string;
	readonly value?: unknown;
	readonly limit?: unknown;
	readonly message: string;
}

/** RFC 9457 problem details. */
export function problem(
	status: number,
	type: string,
	title: string,
	errors: readonly ProblemEntry[] = [],
	headers: Record<string, string> = {},
	more: object = {}
): Response {
	return new Response(JSON.stringify({ type: `/problems/${type}`, title, status, errors, ...more }), {
		status,
		headers: { 'content-type': 'application/problem+json', ...headers }
	});
}

const TITLE = {
	'not-found': 'There is nothing at this address that you may see.',
	forbidden: 'Your role does not allow this.',
	invalid: 'Some values cannot be taken.',
	conflict: 'Somebody saved in between.',
	exists: 'This exists already.',
	frozen: 'This is released or in review and cannot be changed.',
	blocked: 'Something stands in the way.',
	'wrong-state': 'The state does not allow this step.',
	'too-many-attempts': 'Too many calls. Wait, then try again.',
	'wrong-credentials': 'E-mail and password do not belong together.',
	'file-too-large': 'The file is larger than the limit.',
	'file-empty': 'The file is empty.',
	'upload-broken': 'The upload was cut off.',
	'kind-not-taken': 'This kind of file is not taken.'
} as const satisfies Record<RefusalCode, string>;

/** For JSON routes. */
export async function orProblem(fn: () => Promise<Response>): Promise<Response> {
	try {
		return await fn();
	} catch (thrown) {
		if (!(thrown instanceof Refused)) throw thrown;
		const retryAfter = thrown.data['retryAfter'];
		const headers = typeof retryAfter === 'number' ? { 'retry-after': String(retryAfter) } : undefined;
		const errors = Array.isArray(thrown.data['errors'])
			? (thrown.data['errors'] as ProblemEntry[])
			: Object.entries(thrown.data).map(([path, value]) => ({ path, value, message: thrown.code }));
		const status = thrown.code === 'wrong-credentials' ? 401 : statusOf(thrown.code);
		// The screens look their sentence up by the code, with the values that it names.
		const more = { code: thrown.code, data: thrown.data };
		return problem(status, thrown.code, TITLE[thrown.code], errors, headers, more);
	}
}
