import type pg from 'pg';
import type { Actor, Role } from '$lib/server/access/actor';
import { newId } from '$lib/server/db/id';

/** A person with one role, as the session would give it; nobody can sign in as them. */
export async function insertPerson(
	owner: pg.Client,
	name: string,
	role: Role,
	clientId: string | null = null
): Promise<Actor> {
	const personId = newId();
	const email = `${name}@laboratory.example`;
	await owner.query('insert into person (id, email, name, password_hash) values ($1, $2, $3, $4)', [
		personId,
		email,
		name,
		'-'
	]);
	const side = role === 'client' ? 'client' : 'staff';
	return { personId, name, email, roles: new Set([role]), side, clientId, decimalSign: '.', singleKeys: true };
}
