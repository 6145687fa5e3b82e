import { createHash } from 'node:crypto';
import { systemActor, type Actor } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { countAttempt, PASSWORD_CHANGES, RESETS_PER_ADDRESS, RESETS_PER_PERSON } from './attempts';
import { readLink, sendLink, spendLink, type LinkPurpose } from './links';
import { hashPassword, verifyPassword } from './passwords';
import { closeAllSessions, openSession, type SessionCookie } from './sessions';
import { config } from '../config';
import { handle } from '../db/pool';
import { withActor, type Trx } from '../db/with-actor';
import { enqueueMail } from '../mail/outbox';
import { Refused } from '../refused';

const WORKSPACE = { kind: 'workspace', id: WORKSPACE_SUBJECT } as const;

/** Mails a link for a new password. Answers the same whether the e-mail is known or not. @throws Refused 'too-many-attempts'. */
export async function requestReset(email: string, address: string, now: Date): Promise<void> {
	const wanted = email.trim().toLowerCase();
	await countAttempt(RESETS_PER_ADDRESS, address, now);
	await countAttempt(RESETS_PER_PERSON, wanted, now);
	const person = await handle()
		.selectFrom('person')
		.select(['id', 'name', 'email'])
		.where('email', '=', wanted)
		.where('disabled_at', 'is', null)
		.executeTakeFirst();
	if (!person) return;
	const actor = systemActor(person.id);
	await withActor(actor, async (trx) => {
		await sendLink(trx, null, person, 'reset', now);
		await audit(trx, actor, { stream: WORKSPACE, action: 'reset-asked', subject: `person/${person.id}` });
	});
}

/** Sets the password behind a one-time link, ends every sign-in and opens a new one. @throws Refused 'not-found' for a link that is over. */
export async function setPassword(
	purpose: LinkPurpose,
	secret: string,
	password: string,
	now: Date
): Promise<SessionCookie> {
	const link = await readLink(secret, purpose, now);
	if (!link) throw new Refused('not-found');
	const hash = await hashPassword(password);
	const actor = systemActor(link.personId);
	await withActor(actor, async (trx) => {
		if (!(await spendLink(trx, secret, purpose, now))) throw new Refused('not-found');
		await storePassword(trx, link.personId, hash);
		await audit(trx, actor, {
			stream: WORKSPACE,
			action: purpose === 'invitation' ? 'invitation-accepted' : 'password-reset',
			subject: `person/${link.personId}`
		});
		if (purpose === 'reset') await tellOfChange(trx, link);
	});
	await closeAllSessions(link.personId);
	return openSession(link.personId);
}

const storePassword = (trx: Trx, personId: string, hash: string) =>
	trx.updateTable('person').set({ password_hash: hash }).where('id', '=', personId).execute();

const tellOfChange = (trx: Trx, { email, name }: { readonly email: string; readonly name: string }) => {
	const { origin, workspaceName } = config();
	return enqueueMail(trx, email, 'passwordChanged', { name, workspace: workspaceName, address: `${origin}/reset` });
};

/** @throws Refused 'wrong-credentials' when the present password is not right, 'too-many-attempts' after guesses. */
export async function changePassword(actor: Actor, present: string, next: string, now: Date): Promise<SessionCookie> {
	await countAttempt(PASSWORD_CHANGES, actor.personId, now);
	const row = await handle()
		.selectFrom('person')
		.select('password_hash')
		.where('id', '=', actor.personId)
		.executeTakeFirst();
	if (!(await verifyPassword(row?.password_hash ?? null, present))) throw new Refused('wrong-credentials');
	const hash = await hashPassword(next);
	await withActor(actor, async (trx) => {
		await storePassword(trx, actor.personId, hash);
		await audit(trx, actor, { stream: WORKSPACE, action: 'password-changed', subject: `person/${actor.personId}` });
		await tellOfChange(trx, actor);
	});
	await closeAllSessions(actor.personId);
	return openSession(actor.personId);
}

export interface SessionView {
	readonly begun: Date;
	readonly lastSeen: Date;
	readonly current: boolean;
}

/** Where a person is signed in, the newest first. */
export async function readSessions(actor: Actor, sessionId: string | null): Promise<readonly SessionView[]> {
	const own = sessionId === null ? '' : createHash('sha256').update(sessionId).digest('hex');
	const rows = await handle()
		.selectFrom('session')
		.select(['id_hash', 'created_at', 'last_seen_at'])
		.where('person_id', '=', actor.personId)
		.where('expires_at', '>', new Date())
		.orderBy('created_at', 'desc')
		.execute();
	return rows.map((row) => ({ begun: row.created_at, lastSeen: row.last_seen_at, current: row.id_hash === own }));
}

/** Ends every sign-in of this person, this one too. */
export async function signOutEverywhere(actor: Actor): Promise<void> {
	await withActor(actor, (trx) =>
		audit(trx, actor, { stream: WORKSPACE, action: 'signed-out-everywhere', subject: `person/${actor.personId}` })
	);
	await closeAllSessions(actor.personId);
}
