import { resolveMaterial } from '$lib/domain/material/resolve';
import type { MaterialFault, MaterialVersion } from '$lib/domain/material/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS, type Id } from '$lib/domain/quantity/units';
import type { MaterialDraft, NewMaterial } from '$lib/schemas/material';
import type { Page } from '$lib/schemas/paging';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { constituentOf, constituentsOf, type ConstituentRow } from '../db/basis';
import { insertConstituents } from '../db/constituents';
import { documentsOf } from '../db/documents';
import { awaitDay } from '../db/due-versions';
import { newId } from '../db/id';
import {
	listMaterials,
	listSuppliers,
	lockMaterialDraft,
	materialByCode,
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
import { Refused } from '../refused';
import { answersOf, type Answers } from './material-answers';
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

/** Opens an empty draft of that number; the caller has seen that none is open. */
export async function insertDraft(trx: Trx, actor: Actor, materialId: string, number: number): Promise<string> {
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
	readonly answers: Answers;
}

/** A material by its code; without a number its newest version. */
export function readMaterial(actor: Actor, code: string, number: number | null): Promise<MaterialView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const versions = await versionsOfMaterial(trx, material.id);
		const version = number === null ? versions[0] : versions.find((each) => each.number === number);
		if (!version) throw new Refused('not-found');
		const constituents = await constituentsOf(trx, [version.id]);
		return {
			material,
			versions,
			version,
			constituents,
			answers: await answersOf(trx, material.id, version, versions, constituents, today()),
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
		await insertConstituents(trx, actor.personId, [{ versionId: version.id, rows: draft.rows }]);
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

export interface Released {
	readonly number: number;
	readonly effectiveFrom: string;
	readonly effects: readonly CopyEffect[];
}

/**
 * Freezes the draft as the version that answers from the effective day on, and carries what it moves to every product.
 * @throws Refused 'blocked' with the faults of a contradictory composition, 'conflict' when somebody saved in between,
 * 'invalid' for a day before the one of the version that answers now.
 */
export function releaseMaterial(
	actor: Actor,
	code: string,
	number: number,
	seen: number,
	effectiveFrom: string = today()
): Promise<Released> {
	requireAct(actor, 'releaseMaterial');
	return withActor(actor, async (trx) => {
		const material = await materialByCode(trx, code);
		const { rev } = await lockMaterialDraft(trx, material.id, number);
		if (rev !== seen) throw new Refused('conflict', { rev });
		return releaseDraft(trx, actor, code, number, effectiveFrom);
	});
}

/** The same inside a transaction, for a draft that nobody else can have seen. */
export async function releaseDraft(
	trx: Trx,
	actor: Actor,
	code: string,
	number: number,
	effectiveFrom: string
): Promise<Released> {
	const material = await materialByCode(trx, code);
	const version = await lockMaterialDraft(trx, material.id, number);
	const rows = await constituentsOf(trx, [version.id]);
	const faults = faultsOf(material.id, version.id, number, rows);
	if (faults.length > 0) throw new Refused('blocked', { faults: faults.map(plainFault) });
	await requireLaterDay(trx, material.id, effectiveFrom);
	await trx
		.updateTable('material_version')
		.set({
			state: 'released',
			effective_from: effectiveFrom,
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
		after: { number, effectiveFrom }
	});
	if (effectiveFrom > today()) {
		await awaitDay(trx, version.id, effectiveFrom, actor.personId);
		return { number, effectiveFrom, effects: [] };
	}
	const label = `${material.tradeName}, version ${number}`;
	const cause = { kind: 'material', versionId: version.id, materialId: material.id, label } as const;
	return { number, effectiveFrom, effects: await moveProducts(trx, actor, cause) };
}

/** A version never answers for days on which a later number already does. */
async function requireLaterDay(trx: Trx, materialId: string, day: string): Promise<void> {
	const latest = (await versionsOfMaterial(trx, materialId)).find(({ state }) => state === 'released')?.effectiveFrom;
	if (latest && day < latest) throw new Refused('invalid', { field: 'effectiveFrom', value: day, limit: latest });
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
	// Versions hashed before a constituent had an origin keep their hash.
	...(row.origin === null ? {} : { origin: row.origin }),
	low: row.low,
	typical: row.typical,
	high: row.high,
	highOpen: row.high_open,
	cas: row.cas,
	ec: row.ec,
	document: row.source_document_id,
	page: row.source_page
});
