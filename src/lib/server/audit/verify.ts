import type { Trx } from '../db/with-actor';
import { auditHash } from './audit';

export interface AuditFault {
	readonly streamId: string;
	readonly seq: string;
	readonly why: 'hash' | 'chain' | 'gap' | 'head';
}

/** Recomputes every chain; an empty answer means that nothing was edited, dropped or cut off. */
export async function verifyAudit(trx: Trx): Promise<readonly AuditFault[]> {
	const streams = await trx.selectFrom('audit_stream').selectAll().orderBy('id').execute();
	const faults: AuditFault[] = [];
	for (const stream of streams) {
		const rows = await trx
			.selectFrom('audit_row')
			.selectAll()
			.where('stream_id', '=', stream.id)
			.orderBy('seq')
			.execute();
		let prevHash = '';
		let expected = 1n;
		for (const row of rows) {
			if (BigInt(row.seq) !== expected) faults.push({ streamId: stream.id, seq: row.seq, why: 'gap' });
			if (row.prev_hash !== prevHash) faults.push({ streamId: stream.id, seq: row.seq, why: 'chain' });
			const hash = auditHash({
				streamId: row.stream_id,
				seq: row.seq,
				at: row.at.toISOString(),
				actorId: row.actor_id,
				action: row.action,
				subject: row.subject,
				before: row.before,
				after: row.after,
				reason: row.reason,
				prevHash: row.prev_hash
			});
			if (hash !== row.hash) faults.push({ streamId: stream.id, seq: row.seq, why: 'hash' });
			prevHash = row.hash;
			expected = BigInt(row.seq) + 1n;
		}
		if (stream.head_hash !== prevHash || BigInt(stream.head_seq) !== expected - 1n) {
			faults.push({ streamId: stream.id, seq: stream.head_seq, why: 'head' });
		}
	}
	return faults;
}
