import type { Actor, DecimalSign } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { withActor } from '../db/with-actor';

export interface Preferences {
	readonly decimalSign?: DecimalSign | undefined;
	readonly singleKeys?: boolean | undefined;
}

/** A person's own settings; nobody sets another's. */
export const savePreferences = (actor: Actor, wanted: Preferences) =>
	withActor(actor, async (trx) => {
		const after = {
			decimal_sign: wanted.decimalSign ?? actor.decimalSign,
			single_keys: wanted.singleKeys ?? actor.singleKeys
		};
		await trx.updateTable('person').set(after).where('id', '=', actor.personId).execute();
		await audit(trx, actor, {
			stream: { kind: 'workspace', id: WORKSPACE_SUBJECT },
			action: 'preferences-changed',
			subject: `person/${actor.personId}`,
			before: { decimal_sign: actor.decimalSign, single_keys: actor.singleKeys },
			after
		});
	});
