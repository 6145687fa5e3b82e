import { sql } from 'kysely';
import { PAGE_SIZE, type ListQuery } from '$lib/schemas/paging';
import type { Trx } from './with-actor';

export interface PersonRow {
	readonly id: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly string[];
	readonly client: string | null;
	readonly disabled: boolean;
}

export async function listPeople(
	trx: Trx,
	query: ListQuery
): Promise<{ readonly rows: readonly PersonRow[]; readonly total: number }> {
	const found = sql<boolean>`person.name || ' ' || person.email ilike ${`%${query.q.replace(/[\\%_]/g, '\\$&')}%`}`;
	const rows = await trx
		.selectFrom('person')
		.leftJoin('membership', 'membership.person_id', 'person.id')
		.leftJoin('client', 'client.id', 'membership.client_id')
		.select([
			'person.id',
			'person.name',
			'person.email',
			sql<
				string[]
			>`coalesce(array_agg(membership.role order by membership.role) filter (where membership.role is not null), '{}')`.as(
				'roles'
			),
			sql<string | null>`max(client.name)`.as('client'),
			sql<boolean>`person.disabled_at is not null`.as('disabled')
		])
		.where(found)
		.groupBy('person.id')
		.orderBy(sql.ref(query.sort === 'email' ? 'person.email' : 'person.name'), query.dir)
		.orderBy('person.id')
		.limit(PAGE_SIZE)
		.offset((query.page - 1) * PAGE_SIZE)
		.execute();
	const { total } = await trx
		.selectFrom('person')
		.select((eb) => eb.fn.countAll<string>().as('total'))
		.where(found)
		.executeTakeFirstOrThrow();
	return { rows, total: Number(total) };
}

export interface ClientRow {
	readonly id: string;
	readonly name: string;
}

export const listClients = (trx: Trx): Promise<ClientRow[]> =>
	trx.selectFrom('client').select(['id', 'name']).orderBy('name').execute();
