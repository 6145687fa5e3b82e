import { sql } from 'kysely';
import type { FormulaVersionRef } from './basis';
import type { Trx } from './with-actor';

/** A formula whose newest version takes the base in as a bulk. */
export interface FamilyMember {
	readonly code: string;
	readonly name: string;
	readonly version: FormulaVersionRef;
	readonly clients: readonly string[];
	readonly baseLineId: string;
	/** Null for a q.s. line. */
	readonly baseShare: string | null;
	readonly pinned: number | null;
}

/** The variants of a base, by name; a variant counts by its newest released version, or by its draft before the first. */
export async function familyOf(trx: Trx, baseId: string): Promise<readonly FamilyMember[]> {
	const { rows } = await sql<{
		code: string;
		name: string;
		formulaId: string;
		versionId: string;
		number: number;
		releasedAt: Date | null;
		clients: string[];
		baseLineId: string;
		baseShare: string | null;
		pinned: number | null;
	}>`
		select f.code, f.name, f.id as "formulaId", v.id as "versionId", v.number, v.released_at as "releasedAt",
			coalesce((select array_agg(distinct c.name order by c.name) from product_formula p
				join client c on c.id = p.client_id where p.formula_id = f.id), '{}') as clients,
			l.id as "baseLineId", l.share as "baseShare", pin.number as pinned
		from formula f
		join lateral (
			select id, number, released_at from formula_version
			where formula_id = f.id order by (state = 'released') desc, number desc limit 1) v on true
		join formula_line l on l.formula_version_id = v.id and l.formula_id = ${baseId}
		left join formula_version pin on pin.id = l.pinned_version_id
		order by f.name, l.position`.execute(trx);
	return rows.map(({ formulaId, versionId, number, releasedAt, baseShare, ...row }) => ({
		...row,
		baseShare: baseShare === null ? null : baseShare.replace(/(\.\d*?)0+$/, '$1').replace(/\.$/, ''),
		version: { id: versionId, formulaId, number, releasedAt: releasedAt ?? new Date() }
	}));
}
