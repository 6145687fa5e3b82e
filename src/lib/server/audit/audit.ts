import { createHash } from 'node:crypto';
import { canonicalText } from '$lib/domain/change/canonical';
import type { Actor } from '../access/actor';
import { newId } from '../db/id';
import type { StreamKind } from '../db/schema';
import type { Trx } from '../db/with-actor';

/** The workspace's own stream has no subject row; this id stands for it. */
export const WORKSPACE_SUBJECT = '00000000-0000-7000-8000-000000000000';

export interface AuditEntry {
	readonly stream: { readonly kind: StreamKind; readonly id: string };
	readonly action: string;
	readonly subject: string;
	readonly before?: unknown;
	readonly after?: unknown;
	readonly reason?: string | null;
}
export interface AuditRef {
	readonly streamId: string;
	readonly seq: string;
}
export interface AuditContent {
	readonly streamId: string;
	readonly seq: string;
	readonly at: string;
	readonly actorId: string | null;
	readonly action: string;
	readonly subject: string;
	readonly before: unknown;
	readonly after: unknown;
	readonly reason: string | null;
	readonly prevHash: string;
}

const plain = (value: unknown): unknown => (value === undefined ? null : JSON.parse(JSON.stringify(value, asText)));
const asText = (_key: string, value: unknown) => (typeof value === 'bigint' ? value.toString() : value);

export const auditHash = (content: AuditContent) => createHash('sha256').update(canonicalText(content)).digest('hex');

/** Adds one row to the chain of its stream, in the transaction of the change it records. */
export async function audit(trx: Trx, actor: Actor, entry: AuditEntry): Promise<AuditRef> {
	const stream = await lockStream(trx, entry.stream.kind, entry.stream.id);
	const content: AuditContent = {
		streamId: stream.id,
		seq: (BigInt(stream.head_seq) + 1n).toString(),
		at: new Date().toISOString(),
		actorId: actor.personId,
		action: entry.action,
		subject: entry.subject,
		before: plain(entry.before),
		after: plain(entry.after),
		reason: entry.reason ?? null,
		prevHash: stream.head_hash
	};
	const hash = auditHash(content);
	await trx
		.insertInto('audit_row')
		.values({
			stream_id: content.streamId,
			seq: content.seq,
			at: content.at,
			actor_id: content.actorId,
			action: content.action,
			subject: content.subject,
			before: content.before === null ? null : JSON.stringify(content.before),
			after: content.after === null ? null : JSON.stringify(content.after),
			reason: content.reason,
			prev_hash: content.prevHash,
			hash
		})
		.execute();
	await trx
		.updateTable('audit_stream')
		.set({ head_seq: content.seq, head_hash: hash })
		.where('id', '=', stream.id)
		.execute();
	return { streamId: stream.id, seq: content.seq };
}

async function lockStream(trx: Trx, kind: StreamKind, subjectId: string) {
	await trx
		.insertInto('audit_stream')
		.values({ id: newId(), kind, subject_id: subjectId })
		.onConflict((conflict) => conflict.columns(['kind', 'subject_id']).doNothing())
		.execute();
	return trx
		.selectFrom('audit_stream')
		.select(['id', 'head_seq', 'head_hash'])
		.where('kind', '=', kind)
		.where('subject_id', '=', subjectId)
		.forUpdate()
		.executeTakeFirstOrThrow();
}
