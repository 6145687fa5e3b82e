import type { z } from 'zod';

/** One value that cannot be taken: where, what was sent, what the limit is, and the code its sentence is looked up by. */
export interface FieldFault {
	readonly path: string;
	readonly value: string;
	readonly limit: string | null;
	readonly why: string;
}

/** The faults of a validation as data, for forms that are sent as JSON. */
export const fieldFaults = (error: z.ZodError, sent: unknown): FieldFault[] =>
	error.issues.map((issue) => ({
		path: issue.path.join('.'),
		value: textAt(sent, issue.path),
		limit: limitOf(issue),
		why: issue.code === 'custom' ? issue.message : issue.code
	}));

function limitOf(issue: z.core.$ZodIssue): string | null {
	if (issue.code === 'custom') {
		const limit: unknown = issue.params?.['limit'];
		return typeof limit === 'string' ? limit : null;
	}
	if (issue.code === 'too_big') return String(issue.maximum);
	if (issue.code === 'too_small') return String(issue.minimum);
	return null;
}

function textAt(sent: unknown, path: readonly PropertyKey[]): string {
	const value = path.reduce<unknown>(
		(at, step) => (typeof at === 'object' && at !== null ? (at as Record<PropertyKey, unknown>)[step] : undefined),
		sent
	);
	return typeof value === 'string' || typeof value === 'number' ? String(value) : '';
}
