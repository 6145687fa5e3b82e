import { fail, type ActionFailure } from '@sveltejs/kit';
import type { z } from 'zod';
import { Refused, type RefusalCode } from '../refused';
import { statusOf } from './answering';
import { fieldFaults, type FieldFault } from './faults';

export interface RefusedJson {
	readonly refused: {
		readonly code: RefusalCode;
		readonly faults: readonly FieldFault[];
		readonly data: Record<string, unknown>;
	};
}

/** A form action whose form carries one JSON text in the field "payload": grids, whose rows no plain form can carry. */
export async function jsonAction<S extends z.ZodType, T>(
	request: Request,
	schema: S,
	fn: (input: z.infer<S>) => Promise<T>
): Promise<{ result: T } | ActionFailure<RefusedJson>> {
	const sent = payloadOf(await request.formData());
	const parsed = schema.safeParse(sent);
	if (!parsed.success) return refuse('invalid', fieldFaults(parsed.error, sent), {});
	try {
		return { result: await fn(parsed.data) };
	} catch (thrown) {
		if (!(thrown instanceof Refused)) throw thrown;
		return refuse(thrown.code, [], { ...thrown.data });
	}
}

const refuse = (code: RefusalCode, faults: readonly FieldFault[], data: Record<string, unknown>) =>
	fail(statusOf(code), { refused: { code, faults, data } });

function payloadOf(form: FormData): unknown {
	const payload = form.get('payload');
	if (typeof payload !== 'string') return undefined;
	try {
		return JSON.parse(payload);
	} catch {
		return undefined;
	}
}
