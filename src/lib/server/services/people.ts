import { PAGE_SIZE, type ListQuery, type Page } from '$lib/schemas/paging';
import type { PersonInput } from '$lib/schemas/person';
import { randomUUID } from 'node:crypto';
import { requireAct } from '../access/acts';
import type { Actor, Role } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { sendLink, waitsForInvitation } from '../auth/links';
import { hashPassword } from '../auth/passwords';
import { newId } from '../db/id';
import { listClients, listPeople, type ClientRow, type PersonRow } from '../db/people';
import { withActor } from '../db/with-actor';
import { Refused } from '../refused';

const WORKSPACE = { kind: 'workspace', id: WORKSPACE_SUBJECT } as const;

export interface PeopleView {
	readonly people: Page<PersonRow>;
	readonly clients: readonly ClientRow[];
}

export function readPeople(actor: Actor, query: ListQuery): Promise<PeopleView> {
	requireAct(actor, 'managePeople');
	return withActor(actor, async (trx) => {
		const { rows, total } = await listPeople(trx, query);
		return {
			people: { rows, total, page: query.page, pageSize: PAGE_SIZE },
			clients: await listClients(trx)
		};
	});
}

/** @throws Refused 'exists' when a client of that name is there. */
export function addClient(actor: Actor, name: string): Promise<string> {
	requireAct(actor, 'managePeople');
	return withActor(actor, async (trx) => {
		const id = newId();
		const { numInsertedOrUpdatedRows } = await trx
			.insertInto('client')
			.values({ id, name, created_by: actor.personId })
			.onConflict((conflict) => conflict.column('name').doNothing())
			.executeTakeFirstOrThrow();
		if (!numInsertedOrUpdatedRows) throw new Refused('exists', { field: 'clientName', value: name });
		await audit(trx, actor, { stream: WORKSPACE, action: 'client-added', subject: `client/${id}`, after: { name } });
		return id;
	});
}

/** Without a password the person is invited by mail and chooses one. @throws Refused 'exists' when somebody signs in with that e-mail already. */
export async function addPerson(actor: Actor, input: PersonInput): Promise<string> {
	requireAct(actor, 'managePeople');
	// Nobody knows the password of somebody who is only invited.
	const passwordHash = await hashPassword(input.password || randomUUID());
	return withActor(actor, async (trx) => {
		const id = newId();
		const email = input.email.toLowerCase();
		const { numInsertedOrUpdatedRows } = await trx
			.insertInto('person')
			.values({ id, email, name: input.name, password_hash: passwordHash, created_by: actor.personId })
			.onConflict((conflict) => conflict.column('email').doNothing())
			.executeTakeFirstOrThrow();
		if (!numInsertedOrUpdatedRows) throw new Refused('exists', { field: 'email', value: email });
		const roles: readonly Role[] = input.clientId ? ['client'] : input.roles;
		await trx
			.insertInto('membership')
			.values(
				roles.map((role) => ({
					person_id: id,
					role,
					client_id: role === 'client' ? input.clientId : null,
					created_by: actor.personId
				}))
			)
			.execute();
		await audit(trx, actor, {
			stream: WORKSPACE,
			action: 'person-added',
			subject: `person/${id}`,
			after: { roles, clientId: input.clientId || null, invited: input.password === '' }
		});
		if (input.password === '') await sendLink(trx, actor, { id, name: input.name, email }, 'invitation', new Date());
		return id;
	});
}

/** Mails somebody a new link to choose a password; the one before no longer works. */
export function mailLink(actor: Actor, personId: string): Promise<void> {
	requireAct(actor, 'managePeople');
	return withActor(actor, async (trx) => {
		const person = await trx
			.selectFrom('person')
			.select(['id', 'name', 'email'])
			.where('id', '=', personId)
			.where('disabled_at', 'is', null)
			.executeTakeFirst();
		if (!person) throw new Refused('not-found');
		// Who has accepted an invitation, or was given a password, has an account already: the mail must not say otherwise.
		await sendLink(trx, actor, person, (await waitsForInvitation(trx, personId)) ? 'invitation' : 'reset', new Date());
		await audit(trx, actor, { stream: WORKSPACE, action: 'link-mailed', subject: `person/${personId}` });
	});
}
