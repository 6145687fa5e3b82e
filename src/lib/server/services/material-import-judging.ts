import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS } from '$lib/domain/quantity/units';
import { constituentOf, constituentsOf, type ConstituentRow } from '../db/basis';
import {
	documentsTitled,
	materialsOfCodes,
	type ImportRecord,
	type PresentMaterial,
	type StoredRow
} from '../db/material-imports';
import type { Trx } from '../db/with-actor';
import {
	groupRows,
	judgeMaterial,
	saidBy,
	type ImportRow,
	type JudgedMaterial,
	type Known,
	type KnownMaterial,
	type SaidRow
} from './material-import-judge';

/** Constituents are read for so many materials at a time. */
const BATCH = 500;

/** What stands in the workspace that these rows speak of. */
async function knownOf(trx: Trx, rows: readonly ImportRow[], sheet: string): Promise<Known> {
	const codes = [...new Set(rows.map((row) => row.cells.material_code ?? ''))];
	const present = await materialsOfCodes(trx, codes);
	const materials = new Map<string, KnownMaterial>();
	for (let from = 0; from < present.length; from += BATCH) {
		const batch = present.slice(from, from + BATCH);
		const parts = await constituentsOf(
			trx,
			batch.map(({ newestVersionId }) => newestVersionId)
		);
		for (const material of batch) materials.set(material.code, knownMaterial(material, parts));
	}
	const titles = rows.flatMap((row) => row.cells.document || []);
	return { materials, documents: await documentsTitled(trx, titles), sheet };
}

function knownMaterial(material: PresentMaterial, parts: readonly ConstituentRow[]): KnownMaterial {
	const own = parts.filter((part) => part.material_version_id === material.newestVersionId);
	return { ...material, said: own.length === 0 ? null : saidBy(own.map(saidByStored)) };
}

function saidByStored(row: ConstituentRow, _at: number, all: readonly ConstituentRow[]): SaidRow {
	const { low, typical, high, highOpen } = constituentOf(row).declared;
	const text = (value: bigint | null) => (value === null ? null : formatExact(value, PART_DECIMALS));
	return {
		substance: row.name_key,
		role: row.place === 'ofWhich' ? 'ofWhich' : (row.role ?? 'ingredient'),
		parent: all.find(({ id }) => id === row.parent_id)?.name_key ?? null,
		use: row.use,
		nano: row.nano,
		origin: row.origin,
		low: text(low),
		typical: text(typical),
		high: text(high),
		highOpen,
		cas: row.cas,
		ec: row.ec
	};
}

export interface Judgement {
	readonly materials: readonly JudgedMaterial[];
	readonly rows: readonly StoredRow[];
}

/** Judges rows material by material against what the workspace holds now. */
export async function judgeRows(trx: Trx, record: ImportRecord, rows: readonly ImportRow[]): Promise<Judgement> {
	const known = await knownOf(trx, rows, record.documentId);
	const materials = [...groupRows(rows)].map(([code, own]) => judgeMaterial(code, own, known));
	const ofCode = new Map(materials.map((material) => [material.code, material]));
	return {
		materials,
		rows: rows.map(({ number, cells }) => {
			const code = cells.material_code ?? '';
			const material = ofCode.get(code);
			return {
				number,
				code,
				cells,
				faults: material?.faults.get(number) ?? [],
				outcome: material?.outcome ?? 'faulty'
			};
		})
	};
}

/** What a sheet's own cell was faulty of: it stays so until the cell is typed anew. */
const FROM_THE_SHEET = new Set(['errorValue', 'notComputed', 'becameDate', 'tooLong']);

export const rowOf = ({ number, cells, faults }: StoredRow): ImportRow => ({
	number,
	cells,
	unread: faults.filter(({ why }) => FROM_THE_SHEET.has(why))
});
