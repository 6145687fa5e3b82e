import { createHash } from 'node:crypto';
import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import { handle } from '../db/pool';

export const hashSessionId = (id: string) => createHash('sha256').update(id).digest('hex');

/** Sessions in PostgreSQL, by a hash of the cookie's id only: a copy of the table opens nothing. */
export class KyselySessionAdapter implements Adapter {
	async getSessionAndUser(sessionId: string): Promise<[DatabaseSession | null, DatabaseUser | null]> {
		const row = await handle()
			.selectFrom('session')
			.innerJoin('person', 'person.id', 'session.person_id')
			.select(['session.person_id', 'session.expires_at'])
			.where('session.id_hash', '=', hashSessionId(sessionId))
			.where('person.disabled_at', 'is', null)
			.executeTakeFirst();
		if (!row) return [null, null];
		return [
			{ id: sessionId, userId: row.person_id, expiresAt: row.expires_at, attributes: {} },
			{ id: row.person_id, attributes: {} }
		];
	}

	async getUserSessions(userId: string): Promise<DatabaseSession[]> {
		const rows = await handle().selectFrom('session').selectAll().where('person_id', '=', userId).execute();
		return rows.map((row) => ({ id: row.id_hash, userId, expiresAt: row.expires_at, attributes: {} }));
	}

	async setSession(session: DatabaseSession): Promise<void> {
		await handle()
			.insertInto('session')
			.values({ id_hash: hashSessionId(session.id), person_id: session.userId, expires_at: session.expiresAt })
			.execute();
	}

	async updateSessionExpiration(sessionId: string, expiresAt: Date): Promise<void> {
		await handle()
			.updateTable('session')
			.set({ expires_at: expiresAt, last_seen_at: new Date() })
			.where('id_hash', '=', hashSessionId(sessionId))
			.execute();
	}

	async deleteSession(sessionId: string): Promise<void> {
		await handle().deleteFrom('session').where('id_hash', '=', hashSessionId(sessionId)).execute();
	}

	async deleteUserSessions(userId: string): Promise<void> {
		await handle().deleteFrom('session').where('person_id', '=', userId).execute();
	}

	async deleteExpiredSessions(): Promise<void> {
		await handle().deleteFrom('session').where('expires_at', '<', new Date()).execute();
	}
}
