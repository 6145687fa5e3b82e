import type { DecisionView } from '$lib/schemas/list-view';
import type { Trx } from './with-actor';

export interface DocumentTitle {
	readonly id: string;
	readonly title: string;
	readonly dated: string | null;
}

export async function documentTitles(trx: Trx, ids: readonly string[]): Promise<ReadonlyMap<string, DocumentTitle>> {
	if (ids.length === 0) return new Map();
	const rows = await trx
		.selectFrom('document')
		.select(['id', 'title', 'dated'])
		.where('id', 'in', [...ids])
		.execute();
	return new Map(rows.map((row) => [row.id, row]));
}

export async function formulaCodes(trx: Trx, ids: readonly string[]): Promise<ReadonlyMap<string, string>> {
	if (ids.length === 0) return new Map();
	const rows = await trx
		.selectFrom('formula')
		.select(['id', 'code'])
		.where('id', 'in', [...ids])
		.execute();
	return new Map(rows.map((row) => [row.id, row.code]));
}

/** The audit row that records a decision on a subject, the latest one. */
export async function decisionOn(trx: Trx, action: string, subject: string): Promise<DecisionView | null> {
	const row = await trx
		.selectFrom('audit_row')
		.innerJoin('person', 'person.id', 'audit_row.actor_id')
		.select(['audit_row.stream_id', 'audit_row.seq', 'audit_row.at', 'person.name'])
		.where('audit_row.action', '=', action)
		.where('audit_row.subject', '=', subject)
		.orderBy('audit_row.at', 'desc')
		.executeTakeFirst();
	return row ? { stream: row.stream_id, seq: row.seq, by: row.name, at: row.at.toISOString() } : null;
}
