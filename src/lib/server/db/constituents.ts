import { sql } from 'kysely';
import { colourIndexIn } from '$lib/domain/ingredients/colour-names';
import { substanceKey } from '$lib/domain/material/substance-key';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS } from '$lib/domain/quantity/units';
import { declaredOf, type ConstituentRowInput } from '$lib/schemas/material';
import { isKnownName } from '../known-names';
import { newId } from './id';
import type { Trx } from './with-actor';

export interface VersionRows {
	readonly versionId: string;
	readonly rows: readonly ConstituentRowInput[];
}

/** A statement may carry 65,535 parameters; a constituent has 18. */
const BATCH = 1_000;

/** Writes the rows of one or many versions; names nobody has used yet become substances, marked where the glossary lacks them. */
export async function insertConstituents(trx: Trx, personId: string, versions: readonly VersionRows[]): Promise<void> {
	const substances = await substancesNamed(
		trx,
		personId,
		versions.flatMap(({ rows }) => rows)
	);
	const values = versions.flatMap(({ versionId, rows }) => constituentValues(versionId, rows, substances));
	for (let from = 0; from < values.length; from += BATCH) {
		await trx
			.insertInto('constituent')
			.values(values.slice(from, from + BATCH))
			.execute();
	}
}

/** Ids of the substances by their key. */
async function substancesNamed(
	trx: Trx,
	personId: string,
	rows: readonly ConstituentRowInput[]
): Promise<ReadonlyMap<string, string>> {
	const named = new Map(rows.map((row) => [substanceKey(row.inci), row]));
	const keys = [...named.keys()];
	const ids = new Map<string, string>();
	for (let from = 0; from < keys.length; from += BATCH) {
		const batch = keys.slice(from, from + BATCH);
		const fresh = batch.flatMap((key) => named.get(key) ?? []);
		await trx
			.insertInto('substance')
			.values(
				fresh.map((row) => ({
					id: newId(),
					inci: row.inci,
					name_key: substanceKey(row.inci),
					cas: row.cas ? [row.cas] : [],
					colour_index: colourIndexIn(row.inci),
					known: isKnownName(row.inci),
					created_by: personId
				}))
			)
			.onConflict((conflict) => conflict.column('name_key').doNothing())
			.execute();
		const { rows: found } = await sql<{ id: string; name_key: string }>`
			select id, name_key from substance where name_key = any(${batch}::text[])`.execute(trx);
		for (const { id, name_key: key } of found) ids.set(key, id);
	}
	return ids;
}

function constituentValues(
	versionId: string,
	rows: readonly ConstituentRowInput[],
	substances: ReadonlyMap<string, string>
) {
	const ids = rows.map(() => newId<'constituent'>());
	const text = (value: bigint | null | undefined) => (value == null ? null : formatExact(value, PART_DECIMALS));
	return rows.map((row, position) => {
		const declared = declaredOf(row);
		const isPart = row.role === 'ofWhich';
		return {
			id: ids[position] ?? newId(),
			material_version_id: versionId,
			position,
			substance_id: substances.get(substanceKey(row.inci)) ?? '',
			place: isPart ? ('ofWhich' as const) : ('inSum' as const),
			role: row.role === 'ofWhich' ? null : row.role,
			parent_id: isPart && row.parent !== null ? (ids[row.parent] ?? null) : null,
			use: row.use,
			nano: row.nano,
			origin: row.origin,
			low: text(declared?.low),
			typical: text(declared?.typical),
			high: text(declared?.high),
			high_open: declared?.highOpen ?? false,
			cas: row.cas || null,
			ec: row.ec || null,
			source_document_id: row.documentId,
			source_page: row.documentId === null ? null : row.page
		};
	});
}
