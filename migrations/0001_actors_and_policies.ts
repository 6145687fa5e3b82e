import { sql, type Kysely } from 'kysely';

// Purpose: the settings that say who acts, and the procedures that give a table its grants and its row-level policy.
// Frozen: imports nothing from src, so it still runs when the code has moved on.
export async function up(db: Kysely<unknown>): Promise<void> {
	await sql`create extension if not exists pg_trgm`.execute(db);
	await sql`grant usage on schema public to costmary_application`.execute(db);

	await sql`
		create function acting_side() returns text language sql stable as
			$$ select nullif(current_setting('costmary.side', true), '') $$`.execute(db);
	await sql`
		create function acting_client() returns uuid language sql stable as
			$$ select nullif(current_setting('costmary.client', true), '')::uuid $$`.execute(db);
	await sql`
		create function acting_person() returns uuid language sql stable as
			$$ select nullif(current_setting('costmary.person', true), '')::uuid $$`.execute(db);
	// An actor whose only staff role is assessor sees assigned products only; the list is set with the actor.
	await sql`
		create function acting_products() returns uuid[] language sql stable as
			$$ select nullif(current_setting('costmary.products', true), '')::uuid[] $$`.execute(db);

	await sql`
		create procedure open_to_laboratory(tab regclass, writes text) language plpgsql as $$
		begin
			execute format('alter table %s enable row level security', tab);
			execute format('grant select, %s on %s to costmary_application', writes, tab);
			execute format('create policy laboratory on %s using (acting_side() in (''staff'', ''system''))', tab);
		end $$`.execute(db);
	await sql`
		create procedure open_to_client(tab regclass, product_column text, writes text) language plpgsql as $$
		begin
			execute format('alter table %s enable row level security', tab);
			execute format('grant select, %s on %s to costmary_application', writes, tab);
			execute format(
				'create policy client_scope on %s using (acting_side() = ''system''
					or (acting_side() = ''staff'' and (acting_products() is null or %I = any (acting_products())))
					or (acting_side() = ''client'' and client_id = acting_client()))', tab, product_column);
		end $$`.execute(db);

	await sql`
		create function refuse_change_once_frozen() returns trigger language plpgsql as $$
		begin
			if old.state <> 'draft' then
				raise exception 'row % of % is frozen', old.id, tg_table_name using errcode = 'check_violation';
			end if;
			return case tg_op when 'DELETE' then old else new end;
		end $$`.execute(db);
}
