import { z } from 'zod';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { withActor } from '../db/with-actor';
import { Refused } from '../refused';

const addressSchema = z.object({ stream: z.uuid(), seq: z.coerce.number().int().positive() });

export interface AuditRowView {
	readonly stream: string;
	readonly seq: number;
	readonly last: number;
	readonly at: string;
	readonly by: string | null;
	readonly action: string;
	readonly subject: string;
	readonly before: string | null;
	readonly after: string | null;
	readonly reason: string | null;
	readonly hash: string;
	readonly previousHash: string;
}

const readable = (value: unknown) => (value === null ? null : JSON.stringify(value, null, 2));

/** One row of the audit. @throws Refused 'not-found'. */
export function readAuditRow(actor: Actor, stream: string, seq: string): Promise<AuditRowView> {
	requireAct(actor, 'readLaboratory');
	const address = addressSchema.safeParse({ stream, seq });
	if (!address.success) throw new Refused('not-found');
	return withActor(actor, async (trx) => {
		const row = await trx
			.selectFrom('audit_row')
			.innerJoin('audit_stream', 'audit_stream.id', 'audit_row.stream_id')
			.leftJoin('person', 'person.id', 'audit_row.actor_id')
			.selectAll('audit_row')
			.select(['audit_stream.head_seq', 'person.name'])
			.where('audit_row.stream_id', '=', address.data.stream)
			.where('audit_row.seq', '=', String(address.data.seq))
			.executeTakeFirst();
		if (!row) throw new Refused('not-found');
		return {
			stream: row.stream_id,
			seq: address.data.seq,
			last: Number(row.head_seq),
			at: row.at.toISOString(),
			by: row.name,
			action: row.action,
			subject: row.subject,
			before: readable(row.before),
			after: readable(row.after),
			reason: row.reason,
			hash: row.hash,
			previousHash: row.prev_hash
		};
	});
}
