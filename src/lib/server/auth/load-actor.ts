import type { Actor, Role } from '../access/actor';
import { handle } from '../db/pool';

/** The actor behind a person, or null when the person is unknown, disabled or without any role. */
export async function loadActor(personId: string): Promise<Actor | null> {
	const rows = await handle()
		.selectFrom('person')
		.innerJoin('membership', 'membership.person_id', 'person.id')
		.select(['person.id', 'name', 'email', 'decimal_sign', 'single_keys', 'role', 'client_id'])
		.where('person.id', '=', personId)
		.where('disabled_at', 'is', null)
		.execute();
	const [first] = rows;
	if (!first) return null;
	const client = rows.find((row) => row.role === 'client');
	return {
		personId: first.id,
		name: first.name,
		email: first.email,
		roles: new Set<Role>(rows.map((row) => row.role)),
		side: client ? 'client' : 'staff',
		clientId: client?.client_id ?? null,
		decimalSign: first.decimal_sign,
		singleKeys: first.single_keys
	};
}
