import { colourIndexIn } from '$lib/domain/ingredients/colour-names';
import { resolveMaterial } from '$lib/domain/material/resolve';
import { substanceKey } from '$lib/domain/material/substance-key';
import type { MaterialFault, MaterialVersion } from '$lib/domain/material/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS, type Id } from '$lib/domain/quantity/units';
import { readFigure, type ConstituentRowInput, type MaterialDraft, type NewMaterial } from '$lib/schemas/material';
import type { Page } from '$lib/schemas/paging';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { constituentOf, constituentsOf, type ConstituentRow } from '../db/basis';
import { documentsOf } from '../db/documents';
import { newId } from '../db/id';
import {
	listMaterials,
	listSuppliers,
	lockMaterialDraft,
	materialByCode,
	substanceNamed,
	supplierNamed,
	versionsOfMaterial,
	whereUsed,
	type MaterialFilter,
	type MaterialHead,
	type MaterialListRow,
	type UseRow,
	type VersionRow
} from '../db/materials';
import { withActor, type Trx } from '../db/with-actor';
import { contentHash } from '../hash';
import { isKnownName } from '../known-names';
import { Refused } from '../refused';
import { moveProducts, type CopyEffect } from './moves';

export interface MaterialsView {
	readonly page: Page<MaterialListRow>;
	readonly suppliers: readonly string[];
}

export function readMaterials(actor: Actor, filter: MaterialFilter): Promise<MaterialsView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => ({
		page: await listMaterials(trx, filter),
		suppliers: await listSuppliers(trx)
	}));
}

/** At most this many rows leave as CSV in one go. */
const CSV_LIMIT = 100_000;

export function allMaterials(actor: Actor, filter: MaterialFilter): Promise<readonly MaterialListRow[]> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => (await listMaterials(trx, { ...filter, page: 1 }, CSV_LIMIT)).rows);
}

/** Makes a material with an empty first draft. @throws Refused 'exists'. */
export function createMaterial(actor: Actor, input: NewMaterial): Promise<string> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const id = newId();
		const supplierId = await supplierNamed(trx, input.supplier, actor.personId);
		const { numInsertedOrUpdatedRows } = await trx
			.insertInto('material')
			.values({
				id,
				code: input.code,
				trade_name: input.tradeName,
				supplier_id: supplierId,
				created_by: actor.personId
			})
			.onConflict((conflict) => conflict.column('code').doNothing())
			.executeTakeFirstOrThrow();
		if (!numInsertedOrUpdatedRows) throw new Refused('exists', { field: 'code', value: input.code });
		await insertDraft(trx, actor, id, 1);
		await audit(trx, actor, {
			stream: { kind: 'material', id },
			action: 'material-created',
			subject: `material/${id}`,
			after: input
		});
		return input.code;
	});
}

async function insertDraft(trx: Trx, actor: Actor, materialId: string, number: number): Promise<string> {
	const id = newId();
	await trx
		.insertInto('material_version')
		.values({ id, material_id: materialId, number, state: 'draft', created_by: actor.personId })
		.execute();
	return id;
}

export interface MaterialView {
	readonly material: MaterialHead;
	readonly versions: readonly VersionRow[];
	readonly version: VersionRow;
	readonly constituents: readonly ConstituentRow[];
	readonly documents: Awaited<ReturnType<typeof documentsOf>>;
	readonly usedIn: readonly UseRow[];
}

/** A material by its code; without a number its newest version. */
export function readMaterial(actor: Actor, code: string, number: number | null): Promise<MaterialView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const versions = await versionsOfMaterial(trx, material.id);
		const version = number === null ? versions[0] : versions.find((each) => each.number === number);
		if (!version) throw new Refused('not-found');
		return {
			material,
			versions,
			version,
			constituents: await constituentsOf(trx, [version.id]),
			documents: await documentsOf(trx, 'material', material.id),
			usedIn: await whereUsed(trx, material.id)
		};
	});
}

/** Opens the next draft with what the newest version holds. @throws Refused 'exists' when a draft is open. */
export function draftMaterial(actor: Actor, code: string): Promise<number> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const [newest] = await versionsOfMaterial(trx, material.id);
		if (!newest) throw new Refused('not-found');
		if (newest.state === 'draft') throw new Refused('exists', { field: 'draft', value: newest.number });
		const number = newest.number + 1;
		const draftId = await insertDraft(trx, actor, material.id, number);
		await copyConstituents(trx, newest.id, draftId);
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'draft-opened',
			subject: `material-version/${draftId}`,
			after: { number, from: newest.number }
		});
		return number;
	});
}

async function copyConstituents(trx: Trx, fromId: string, toId: string): Promise<void> {
	const rows = await trx.selectFrom('constituent').selectAll().where('material_version_id', '=', fromId).execute();
	if (rows.length === 0) return;
	const ids = new Map(rows.map((row) => [row.id, newId<'constituent'>()]));
	await trx
		.insertInto('constituent')
		.values(
			rows.map((row) => ({
				...row,
				id: ids.get(row.id) ?? newId(),
				material_version_id: toId,
				parent_id: row.parent_id === null ? null : (ids.get(row.parent_id) ?? null)
			}))
		)
		.execute();
}

/** Saves the whole sheet. A contradictory one is kept as draft. @throws Refused 'conflict' with what the other person saved. */
export function saveMaterialDraft(actor: Actor, code: string, number: number, draft: MaterialDraft): Promise<number> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const version = await lockMaterialDraft(trx, material.id, number);
		const before = await constituentsOf(trx, [version.id]);
		if (version.rev !== draft.rev) throw new Refused('conflict', { rev: version.rev, theirs: before.map(plainRow) });
		await trx.deleteFrom('constituent').where('material_version_id', '=', version.id).execute();
		await insertRows(trx, actor, version.id, draft.rows);
		const rev = version.rev + 1;
		await trx.updateTable('material_version').set({ rev }).where('id', '=', version.id).execute();
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'draft-saved',
			subject: `material-version/${version.id}`,
			before: before.map(plainRow),
			after: draft.rows
		});
		return rev;
	});
}

const plainRow = (row: ConstituentRow) => ({
	inci: row.inci,
	cas: row.cas,
	min: row.low,
	typical: row.typical,
	max: row.high,
	role: row.place === 'ofWhich' ? 'ofWhich' : row.role
});

const stored = (text: string): { readonly value: string | null; readonly open: boolean } => {
	const figure = readFigure(text);
	return figure.kind === 'value'
		? { value: formatExact(figure.value, PART_DECIMALS), open: figure.open }
		: { value: null, open: false };
};

async function insertRows(
	trx: Trx,
	actor: Actor,
	versionId: string,
	rows: readonly ConstituentRowInput[]
): Promise<void> {
	if (rows.length === 0) return;
	const ids = rows.map(() => newId<'constituent'>());
	const values = [];
	for (const [position, row] of rows.entries()) {
		const substanceId = await substanceNamed(
			trx,
			{
				inci: row.inci,
				key: substanceKey(row.inci),
				colourIndex: colourIndexIn(row.inci),
				known: isKnownName(row.inci),
				cas: row.cas || null
			},
			actor.personId
		);
		const typical = stored(row.typical);
		const max = stored(row.max);
		// "< 0.1" as the only figure is a bound from 0, wherever it was typed.
		const boundOnly = typical.open && max.value === null;
		values.push({
			id: ids[position] ?? newId(),
			material_version_id: versionId,
			position,
			substance_id: substanceId,
			place: row.role === 'ofWhich' ? ('ofWhich' as const) : ('inSum' as const),
			role: row.role === 'ofWhich' ? null : row.role,
			parent_id: row.role === 'ofWhich' && row.parent !== null ? (ids[row.parent] ?? null) : null,
			use: row.use,
			nano: row.nano,
			low: stored(row.min).value,
			typical: boundOnly ? null : typical.value,
			high: boundOnly ? typical.value : max.value,
			high_open: boundOnly || max.open,
			cas: row.cas || null,
			ec: row.ec || null,
			source_document_id: row.documentId,
			source_page: row.documentId === null ? null : row.page
		});
	}
	await trx.insertInto('constituent').values(values).execute();
}

export interface Released {
	readonly number: number;
	readonly effects: readonly CopyEffect[];
}

/**
 * Freezes the draft as the version that answers from today, and carries what it moves to every product.
 * @throws Refused 'blocked' with the faults of a contradictory composition, 'conflict' when somebody saved in between.
 */
export function releaseMaterial(actor: Actor, code: string, number: number, rev: number): Promise<Released> {
	requireAct(actor, 'releaseMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const version = await lockMaterialDraft(trx, material.id, number);
		if (version.rev !== rev) throw new Refused('conflict', { rev: version.rev });
		const rows = await constituentsOf(trx, [version.id]);
		const faults = faultsOf(material.id, version.id, number, rows);
		if (faults.length > 0) throw new Refused('blocked', { faults: faults.map(plainFault) });
		const day = today();
		await trx
			.updateTable('material_version')
			.set({
				state: 'released',
				effective_from: day,
				content_hash: contentHash(rows.map(hashedRow)),
				released_at: new Date(),
				released_by: actor.personId
			})
			.where('id', '=', version.id)
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'material', id: material.id },
			action: 'version-released',
			subject: `material-version/${version.id}`,
			after: { number, effectiveFrom: day }
		});
		const label = `${material.tradeName}, version ${number}`;
		const cause = { kind: 'material', versionId: version.id, materialId: material.id, label } as const;
		return { number, effects: await moveProducts(trx, actor, cause) };
	});
}

function faultsOf(
	materialId: string,
	versionId: string,
	number: number,
	rows: readonly ConstituentRow[]
): readonly MaterialFault[] {
	const version: MaterialVersion = {
		id: versionId as Id<'materialVersion'>,
		material: materialId as Id<'material'>,
		number,
		effectiveFrom: null,
		contentHash: null,
		constituents: rows.map(constituentOf)
	};
	const outcome = resolveMaterial(version);
	return outcome.ok ? [] : outcome.faults;
}

const plainFault = (fault: MaterialFault) => ({
	kind: fault.kind,
	by: 'by' in fault ? formatExact(fault.by, PART_DECIMALS) : null
});

/** What a version says, without the ids of its rows: two versions that say the same have one hash. */
const hashedRow = (row: ConstituentRow, _index: number, rows: readonly ConstituentRow[]) => ({
	substance: row.name_key,
	place: row.place,
	role: row.role,
	parent: rows.find((each) => each.id === row.parent_id)?.name_key ?? null,
	use: row.use,
	nano: row.nano,
	low: row.low,
	typical: row.typical,
	high: row.high,
	highOpen: row.high_open,
	cas: row.cas,
	ec: row.ec,
	document: row.source_document_id,
	page: row.source_page
});
