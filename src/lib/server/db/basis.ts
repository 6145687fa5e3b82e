import { sql } from 'kysely';
import type { FormulaLine, FormulaVersionLines } from '$lib/domain/composition/types';
import type { SubstanceIdentity } from '$lib/domain/ingredients/types';
import type { Constituent, MaterialVersion } from '$lib/domain/material/types';
import { decimalOf } from '$lib/domain/quantity/decimal';
import {
	LINE_DECIMALS,
	PART_DECIMALS,
	type Id,
	type IsoDate,
	type LineShare,
	type PartShare,
	type Sha256
} from '$lib/domain/quantity/units';
import type { Trx } from './with-actor';

export interface FormulaVersionRef {
	readonly id: string;
	readonly formulaId: string;
	readonly number: number;
	readonly releasedAt: Date;
}

/** The released version that answers for a formula: the pinned one, else the newest. */
export async function answeringFormulaVersion(
	trx: Trx,
	formulaId: string,
	pinnedVersionId: string | null
): Promise<FormulaVersionRef | null> {
	const row = await trx
		.selectFrom('formula_version')
		.select(['id', 'formula_id', 'number', 'released_at'])
		.where('formula_id', '=', formulaId)
		.where('state', '=', 'released')
		.$if(pinnedVersionId !== null, (query) => query.where('id', '=', pinnedVersionId))
		.orderBy('number', 'desc')
		.executeTakeFirst();
	if (!row?.released_at) return null;
	return { id: row.id, formulaId: row.formula_id, number: row.number, releasedAt: row.released_at };
}

const lineShare = (text: string | null) => (text === null ? null : (decimalOf(text, LINE_DECIMALS) as LineShare));
const partShare = (text: string | null) => (text === null ? null : (decimalOf(text, PART_DECIMALS) as PartShare));

export interface LineRow {
	readonly id: string;
	readonly phase: string;
	readonly material_id: string | null;
	readonly formula_id: string | null;
	readonly share_min: string | null;
	readonly share: string | null;
	readonly share_max: string | null;
	readonly is_qs: boolean;
	readonly pinned_version_id: string | null;
}

/**
 * A bulk's place in a tree. One that is pinned is another bulk than the one that follows: both may stand in one formula, each by
 * its own version.
 */
const bulkKey = (formulaId: string, pinned: string | null) =>
	(pinned === null ? formulaId : `${formulaId}@${pinned}`) as Id<'formula'>;
/** The formula behind a place of the tree. */
export const formulaOfKey = (key: string) => key.split('@')[0] ?? key;

/** A stored line as the core reads it. A line without an amount weighs nothing yet. */
export function lineOf(row: LineRow): FormulaLine {
	const amount = row.is_qs
		? ({ kind: 'qs' } as const)
		: ({
				kind: 'share',
				min: lineShare(row.share_min),
				share: lineShare(row.share) ?? (0n as LineShare),
				max: lineShare(row.share_max)
			} as const);
	const common = { id: row.id as Id<'line'>, phase: row.phase, amount };
	return row.material_id !== null
		? { ...common, material: row.material_id as Id<'material'> }
		: { ...common, formula: bulkKey(row.formula_id ?? '', row.pinned_version_id) };
}

export interface Tree {
	/** By place in the tree (see formulaOfKey), as the formulas below. */
	readonly versions: ReadonlyMap<string, FormulaVersionRef>;
	readonly formulas: ReadonlyMap<Id<'formula'>, FormulaVersionLines>;
}

/**
 * The formula version and every bulk below it, each by the version that answers for it. `instead` answers for its formula
 * wherever the newest version would, as if it were released.
 */
export async function loadTree(trx: Trx, root: FormulaVersionRef, instead?: FormulaVersionRef): Promise<Tree> {
	const versions = new Map<string, FormulaVersionRef>([[root.formulaId, root]]);
	const formulas = new Map<Id<'formula'>, FormulaVersionLines>();
	let pending: readonly (readonly [string, FormulaVersionRef])[] = [[root.formulaId, root]];
	while (pending.length > 0) {
		const rows = await linesOf(
			trx,
			pending.map(([, version]) => version.id)
		);
		const next: [string, FormulaVersionRef][] = [];
		for (const [key, version] of pending) {
			const own = rows.filter((row) => row.formula_version_id === version.id);
			formulas.set(key as Id<'formula'>, {
				formula: key as Id<'formula'>,
				version: version.id as Id<'formulaVersion'>,
				lines: own.map(lineOf)
			});
			for (const { formula_id: formulaId, pinned_version_id: pinned } of own) {
				if (formulaId === null || versions.has(bulkKey(formulaId, pinned))) continue;
				const stands = pinned === null && instead?.formulaId === formulaId ? instead : null;
				const below = stands ?? (await answeringFormulaVersion(trx, formulaId, pinned));
				if (!below) continue;
				versions.set(bulkKey(formulaId, pinned), below);
				next.push([bulkKey(formulaId, pinned), below]);
			}
		}
		pending = next;
	}
	return { versions, formulas };
}

const linesOf = (trx: Trx, versionIds: readonly string[]) =>
	trx
		.selectFrom('formula_line')
		.selectAll()
		.where('formula_version_id', 'in', [...versionIds])
		.orderBy('position')
		.execute();

export interface MaterialVersionRef {
	readonly versionId: string;
	readonly materialId: string;
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly number: number;
}
export interface LoadedMaterials {
	readonly refs: ReadonlyMap<string, MaterialVersionRef>;
	readonly materials: ReadonlyMap<Id<'material'>, MaterialVersion>;
	readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
}

/** For each material the newest released version effective on the day, with its constituents and their substances. */
export async function loadMaterials(trx: Trx, materialIds: readonly string[], day: IsoDate): Promise<LoadedMaterials> {
	if (materialIds.length === 0) return { refs: new Map(), materials: new Map(), substances: new Map() };
	const versions = await trx
		.selectFrom('material_version')
		.innerJoin('material', 'material.id', 'material_version.material_id')
		.innerJoin('supplier', 'supplier.id', 'material.supplier_id')
		.distinctOn('material_version.material_id')
		.select([
			'material_version.id as versionId',
			'material.id as materialId',
			'material.code',
			'material.trade_name as tradeName',
			'supplier.name as supplier',
			'material_version.number',
			'material_version.effective_from as effectiveFrom',
			'material_version.content_hash as contentHash'
		])
		.where('material.id', 'in', [...materialIds])
		.where('material_version.state', '=', 'released')
		.where(sql<boolean>`material_version.effective_from <= ${day}::date`)
		.orderBy('material_version.material_id')
		.orderBy('material_version.number', 'desc')
		.execute();
	const parts = await constituentsOf(
		trx,
		versions.map((version) => version.versionId)
	);
	const materials = new Map<Id<'material'>, MaterialVersion>();
	for (const version of versions) {
		const own = parts.filter((part) => part.material_version_id === version.versionId);
		materials.set(version.materialId as Id<'material'>, {
			id: version.versionId as Id<'materialVersion'>,
			material: version.materialId as Id<'material'>,
			number: version.number,
			effectiveFrom: version.effectiveFrom as IsoDate | null,
			contentHash: version.contentHash as Sha256 | null,
			constituents: own.map(constituentOf)
		});
	}
	return {
		refs: new Map(versions.map((version) => [version.materialId, version])),
		materials,
		substances: new Map(parts.map((part) => [part.substance_id as Id<'substance'>, identityOf(part)]))
	};
}

/** A formula version with every bulk and material below it, as they answer on the day. */
export async function loadFormula(trx: Trx, version: FormulaVersionRef, day: IsoDate, instead?: FormulaVersionRef) {
	const tree = await loadTree(trx, version, instead);
	const lines = [...tree.formulas.values()].flatMap((each) => each.lines);
	const loaded = await loadMaterials(trx, [...new Set(lines.flatMap((line) => line.material ?? []))], day);
	return { tree, loaded };
}

/** Constituents with the names and numbers of their substances, in the order of the statement. */
export async function constituentsOf(trx: Trx, versionIds: readonly string[]) {
	if (versionIds.length === 0) return [];
	return trx
		.selectFrom('constituent')
		.innerJoin('substance', 'substance.id', 'constituent.substance_id')
		.select([
			'constituent.id',
			'constituent.material_version_id',
			'constituent.position',
			'constituent.substance_id',
			'constituent.place',
			'constituent.role',
			'constituent.parent_id',
			'constituent.use',
			'constituent.nano',
			'constituent.low',
			'constituent.typical',
			'constituent.high',
			'constituent.high_open',
			'constituent.cas',
			'constituent.ec',
			'constituent.source_document_id',
			'constituent.source_page',
			'constituent.origin',
			'substance.inci',
			'substance.name_key',
			'substance.known',
			'substance.cas as substance_cas',
			'substance.ec as substance_ec',
			'substance.colour_index'
		])
		.where('constituent.material_version_id', 'in', [...versionIds])
		.orderBy('constituent.material_version_id')
		.orderBy('constituent.position')
		.execute();
}
export type ConstituentRow = Awaited<ReturnType<typeof constituentsOf>>[number];

export const identityOf = (row: ConstituentRow): SubstanceIdentity => ({
	id: row.substance_id as Id<'substance'>,
	inci: row.inci,
	key: row.name_key,
	cas: row.cas && !row.substance_cas.includes(row.cas) ? [...row.substance_cas, row.cas] : row.substance_cas,
	colourIndex: row.colour_index
});

/** A stored constituent as the core reads it. */
export function constituentOf(row: ConstituentRow): Constituent {
	const common = {
		id: row.id as Id<'constituent'>,
		substance: row.substance_id as Id<'substance'>,
		declared: {
			low: partShare(row.low),
			typical: partShare(row.typical),
			high: partShare(row.high),
			highOpen: row.high_open
		},
		nano: row.nano,
		use: row.use,
		source: row.source_document_id
			? { document: row.source_document_id as Id<'document'>, page: row.source_page }
			: null
	};
	return row.place === 'ofWhich'
		? { ...common, place: 'ofWhich', parent: row.parent_id as Id<'constituent'> }
		: { ...common, place: 'inSum', role: row.role ?? 'ingredient' };
}
