import { createHash } from 'node:crypto';
import { systemActor } from '../src/lib/server/access/actor';
import { verifyAudit } from '../src/lib/server/audit/verify';
import { closePool } from '../src/lib/server/db/pool';
import { withActor } from '../src/lib/server/db/with-actor';

/** Recomputes every chain of the audit and, when all hold, writes a checkpoint over their heads. */
async function main(): Promise<number> {
	return withActor(systemActor('00000000-0000-7000-8000-000000000000'), async (trx) => {
		const faults = await verifyAudit(trx);
		for (const { streamId, seq, why } of faults) console.error(`stream ${streamId}, row ${seq}: ${why}`);
		if (faults.length > 0) return 1;
		const heads = await trx.selectFrom('audit_stream').select(['id', 'head_hash']).orderBy('id').execute();
		const text = heads.map((head) => `${head.id} ${head.head_hash}`).join('\n');
		const hash = createHash('sha256').update(text).digest('hex');
		await trx.insertInto('audit_checkpoint').values({ at: new Date(), heads_hash: hash }).execute();
		console.log(`${heads.length} streams hold. Checkpoint ${hash}`);
		return 0;
	});
}

main()
	.then((code) => {
		process.exitCode = code;
	})
	.finally(() => closePool());
