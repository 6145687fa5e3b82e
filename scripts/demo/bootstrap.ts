import { loadActor } from '../../src/lib/server/auth/load-actor';
import { hashPassword } from '../../src/lib/server/auth/passwords';
import { systemActor, type Actor } from '../../src/lib/server/access/actor';
import { audit, WORKSPACE_SUBJECT } from '../../src/lib/server/audit/audit';
import { newId } from '../../src/lib/server/db/id';
import { withActor } from '../../src/lib/server/db/with-actor';

export interface Account {
	readonly email: string;
	readonly password: string;
	readonly name: string;
	readonly roles: readonly string[];
}

/** The first administrator, whom nobody could have added through a page; null when there is one already. */
export async function firstAdministrator(account: Omit<Account, 'roles'>): Promise<Actor | null> {
	const id = newId();
	const actor = systemActor(id);
	const passwordHash = await hashPassword(account.password);
	const made = await withActor(actor, async (trx) => {
		const present = await trx
			.selectFrom('membership')
			.select('person_id')
			.where('role', '=', 'administrator')
			.executeTakeFirst();
		if (present) return false;
		await trx
			.insertInto('person')
			.values({
				id,
				email: account.email.toLowerCase(),
				name: account.name,
				password_hash: passwordHash,
				created_by: null
			})
			.execute();
		await trx
			.insertInto('membership')
			.values({ person_id: id, role: 'administrator', client_id: null, created_by: null })
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'workspace', id: WORKSPACE_SUBJECT },
			action: 'person-added',
			subject: `person/${id}`,
			after: { roles: ['administrator'] }
		});
		return true;
	});
	return made ? loadActor(id) : null;
}
