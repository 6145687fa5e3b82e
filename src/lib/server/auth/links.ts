import { createHash, randomBytes } from 'node:crypto';
import type { Actor } from '../access/actor';
import { config } from '../config';
import { newId } from '../db/id';
import { enqueueMail } from '../mail/outbox';
import { handle } from '../db/pool';
import type { Trx } from '../db/with-actor';

export type LinkPurpose = 'invitation' | 'reset';

const HOUR_MS = 60 * 60 * 1000;
const LIFE_MS = { invitation: 7 * 24 * HOUR_MS, reset: HOUR_MS } as const satisfies Record<LinkPurpose, number>;
const PATH = { invitation: 'invitation', reset: 'reset' } as const satisfies Record<LinkPurpose, string>;

const hashSecret = (secret: string) => createHash('sha256').update(secret).digest('hex');

interface Person {
	readonly id: string;
	readonly name: string;
	readonly email: string;
}

/** Makes a link, mails it, and lets every earlier one of its purpose go. Only a hash of the secret is kept. */
export async function sendLink(
	trx: Trx,
	by: Actor | null,
	person: Person,
	purpose: LinkPurpose,
	now: Date
): Promise<void> {
	const secret = randomBytes(32).toString('base64url');
	const expiresAt = new Date(now.getTime() + LIFE_MS[purpose]);
	await trx
		.updateTable('one_time_link')
		.set({ expires_at: now })
		.where('person_id', '=', person.id)
		.where('purpose', '=', purpose)
		.where('used_at', 'is', null)
		.where('expires_at', '>', now)
		.execute();
	await trx
		.insertInto('one_time_link')
		.values({
			id: newId(),
			secret_hash: hashSecret(secret),
			purpose,
			person_id: person.id,
			expires_at: expiresAt,
			created_by: by?.personId ?? null
		})
		.execute();
	const { origin, workspaceName } = config();
	await enqueueMail(trx, person.email, purpose, {
		name: person.name,
		workspace: workspaceName,
		link: `${origin}/${PATH[purpose]}/${secret}`,
		until: `${expiresAt.toISOString().slice(0, 16).replace('T', ' ')} UTC`
	});
}

export interface OpenLink {
	readonly personId: string;
	readonly name: string;
	readonly email: string;
}

/** Whom a link is for, or null when it is used, over, false, or its person may not sign in. */
export async function readLink(secret: string, purpose: LinkPurpose, now: Date): Promise<OpenLink | null> {
	const row = await handle()
		.selectFrom('one_time_link')
		.innerJoin('person', 'person.id', 'one_time_link.person_id')
		.select(['person.id as personId', 'person.name', 'person.email'])
		.where('secret_hash', '=', hashSecret(secret))
		.where('purpose', '=', purpose)
		.where('used_at', 'is', null)
		.where('one_time_link.expires_at', '>', now)
		.where('person.disabled_at', 'is', null)
		.executeTakeFirst();
	return row ?? null;
}

/** Somebody was invited and has not accepted yet. */
export async function waitsForInvitation(trx: Trx, personId: string): Promise<boolean> {
	const rows = await trx
		.selectFrom('one_time_link')
		.select('used_at')
		.where('person_id', '=', personId)
		.where('purpose', '=', 'invitation')
		.execute();
	return rows.length > 0 && rows.every((row) => row.used_at === null);
}

/** Marks a link used; false when somebody was first or it is over. */
export async function spendLink(trx: Trx, secret: string, purpose: LinkPurpose, now: Date): Promise<boolean> {
	const { numUpdatedRows } = await trx
		.updateTable('one_time_link')
		.set({ used_at: now })
		.where('secret_hash', '=', hashSecret(secret))
		.where('purpose', '=', purpose)
		.where('used_at', 'is', null)
		.where('expires_at', '>', now)
		.executeTakeFirst();
	return numUpdatedRows > 0n;
}
