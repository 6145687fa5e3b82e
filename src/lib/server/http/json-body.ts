import type { z } from 'zod';
import { Refused } from '../refused';
import type { ProblemEntry } from './answering';

/** Reads and validates a JSON body. @throws Refused 'invalid' with path, value as sent, limit and message of every fault. */
export async function jsonBody<S extends z.ZodType>(request: Request, schema: S): Promise<z.infer<S>> {
	let body: unknown;
	try {
		body = await request.json();
	} catch {
		throw new Refused('invalid', { errors: [{ path: '', message: 'The body is no JSON.' }] });
	}
	const parsed = schema.safeParse(body);
	if (parsed.success) return parsed.data;
	const errors = parsed.error.issues.map((issue): ProblemEntry => {
		const limit = limitOf(issue);
		return {
			path: issue.path.join('.'),
			value: valueAt(body, issue.path),
			...(limit === undefined ? {} : { limit }),
			message: MESSAGES[issue.message] ?? issue.message
		};
	});
	throw new Refused('invalid', { errors });
}

const MESSAGES: Readonly<Record<string, string>> = {
	empty: 'A decimal is missing.',
	notANumber: 'This is no decimal.',
	grouping: 'Write decimals without grouping; one sign only, "." or ",".',
	negative: 'A percentage is not negative.',
	tooManyDecimals: 'More decimals than can be held exactly.',
	tooLong: 'This is too long for a decimal.',
	aboveMost: 'This is more than the whole.',
	notADate: 'This is no calendar day; write YYYY-MM-DD.',
	materialOrFormula: 'A line names either a material or a formula.',
	percentOrQs: 'A line has either a percentage or "qs": true.'
};

function limitOf(issue: z.core.$ZodIssue): unknown {
	if (issue.code === 'custom') return issue.params?.['limit'] ?? undefined;
	if (issue.code === 'too_big') return issue.maximum;
	if (issue.code === 'too_small') return issue.minimum;
	if (issue.code === 'invalid_value') return issue.values;
	return undefined;
}

function valueAt(body: unknown, path: readonly PropertyKey[]): unknown {
	return path.reduce<unknown>(
		(value, step) =>
			typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[step] : undefined,
		body
	);
}
