import type { Actor } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { today } from '../clock';
import { insertConstituents, type VersionRows } from '../db/constituents';
import { documentById, insertLink } from '../db/documents';
import { newId } from '../db/id';
import {
	importById,
	importRows,
	lockImport,
	materialsOfCodes,
	putRows,
	removeRows,
	updateImport,
	type ImportRecord
} from '../db/material-imports';
import { supplierNamed } from '../db/materials';
import { withActor, type Trx } from '../db/with-actor';
import { Refused } from '../refused';
import { readSheet, UnreadableSheet, type SheetRow } from '../sheets';
import { bucket } from '../storage/bucket';
import { contentKey } from '../storage/keys';
import { rowsOfSheet, type JudgedMaterial } from './material-import-judge';
import { judgeRows, rowOf } from './material-import-judging';
import { insertDraft, releaseDraft } from './materials';

/** Called with how many of how many are done. */
export type OnProgress = (done: number, total: number) => void;

/** Reads the sheet and judges every row. Safe to run twice: what an earlier run wrote is written over. */
export async function readMaterialImport(actor: Actor, id: string, onprogress: OnProgress): Promise<void> {
	const record = await withActor(actor, (trx) => importById(trx, id));
	if (record.state !== 'reading') return;
	const sheet = await sheetOf(actor, record);
	if (sheet instanceof UnreadableSheet) return refuseSheet(actor, id, sheet.problem);
	const read = rowsOfSheet(sheet);
	if (!read.ok) return refuseSheet(actor, id, read.problem);
	if (read.rows.length === 0) return refuseSheet(actor, id, { kind: 'empty' });
	onprogress(0, read.rows.length);
	await withActor(actor, async (trx) => {
		await lockImport(trx, id, 'reading');
		const judgement = await judgeRows(trx, record, read.rows);
		await removeRows(trx, id);
		await putRows(trx, id, judgement.rows);
		await updateImport(trx, id, { state: 'judged', ignoredColumns: read.ignored });
	});
}

async function sheetOf(actor: Actor, record: ImportRecord): Promise<readonly SheetRow[] | UnreadableSheet> {
	const document = await withActor(actor, (trx) => documentById(trx, record.documentId));
	const object = await bucket().get(contentKey(document.sha256));
	if (!object) return new UnreadableSheet({ kind: 'empty' });
	try {
		return await readSheet(object.body, document.mediaType);
	} catch (error) {
		if (error instanceof UnreadableSheet) return error;
		throw error;
	}
}

const refuseSheet = (actor: Actor, id: string, problem: object): Promise<void> =>
	withActor(actor, (trx) => updateImport(trx, id, { state: 'unreadable', problem }));

/**
 * Makes every material of the import in one transaction, or none. What moved in the workspace since it was judged is judged
 * again: a row that has become faulty gives the import back to its person.
 */
export async function commitMaterialImport(actor: Actor, id: string, onprogress: OnProgress): Promise<void> {
	try {
		await withActor(actor, (trx) => commitAll(trx, actor, id, onprogress));
	} catch (error) {
		if (!(error instanceof Refused && error.code === 'blocked')) throw error;
		await withActor(actor, (trx) => giveBack(trx, id));
	}
}

async function commitAll(trx: Trx, actor: Actor, id: string, onprogress: OnProgress): Promise<void> {
	const record = await importById(trx, id);
	if (record.state === 'committed') return;
	await lockImport(trx, id, 'committing');
	const rows = await importRows(trx, id, 'all');
	const { materials, rows: judged } = await judgeRows(trx, record, rows.map(rowOf));
	if (materials.some(({ outcome }) => outcome === 'faulty')) throw new Refused('blocked');
	await putRows(trx, id, judged);
	const made = await makeVersions(trx, actor, record, materials, onprogress);
	if (record.release) await releaseAll(trx, actor, record, made, onprogress);
	await updateImport(trx, id, { state: 'committed', committedAt: new Date() });
	await audit(trx, actor, {
		stream: { kind: 'workspace', id: WORKSPACE_SUBJECT },
		action: 'import-committed',
		subject: `material-import/${id}`,
		after: { materials: made.length, released: record.release }
	});
}

async function giveBack(trx: Trx, id: string): Promise<void> {
	const record = await lockImport(trx, id, 'committing');
	const rows = await importRows(trx, id, 'all');
	const judgement = await judgeRows(trx, record, rows.map(rowOf));
	await putRows(trx, id, judgement.rows);
	await updateImport(trx, id, { state: 'judged' });
}

interface MadeVersion {
	readonly materialId: string;
	readonly code: string;
	readonly number: number;
	readonly isNew: boolean;
}

/** Progress is told once in so many materials. */
const TOLD_EVERY = 50;

async function makeVersions(
	trx: Trx,
	actor: Actor,
	record: ImportRecord,
	materials: readonly JudgedMaterial[],
	onprogress: OnProgress
): Promise<readonly MadeVersion[]> {
	const wanted = materials.filter(({ outcome }) => outcome === 'newMaterial' || outcome === 'newVersion');
	const present = new Map(
		(
			await materialsOfCodes(
				trx,
				wanted.map(({ code }) => code)
			)
		).map((material) => [material.code, material])
	);
	const made: MadeVersion[] = [];
	const versions: VersionRows[] = [];
	for (const [at, material] of wanted.entries()) {
		if (at % TOLD_EVERY === 0) onprogress(at, wanted.length);
		const here = present.get(material.code);
		const materialId = here?.id ?? (await makeMaterial(trx, actor, material));
		const number = (here?.newest ?? 0) + 1;
		const versionId = await insertDraft(trx, actor, materialId, number);
		versions.push({ versionId, rows: material.rows });
		made.push({ materialId, code: material.code, number, isNew: !here });
		await citeDocuments(trx, actor, record, materialId, material);
		await audit(trx, actor, {
			stream: { kind: 'material', id: materialId },
			action: here ? 'draft-opened' : 'material-created',
			subject: `material-version/${versionId}`,
			after: { number, import: record.id, rows: material.rows }
		});
	}
	await insertConstituents(trx, actor.personId, versions);
	return made;
}

async function makeMaterial(trx: Trx, actor: Actor, { code, tradeName, supplier }: JudgedMaterial): Promise<string> {
	const id = newId();
	const supplierId = await supplierNamed(trx, supplier, actor.personId);
	await trx
		.insertInto('material')
		.values({ id, code, trade_name: tradeName, supplier_id: supplierId, created_by: actor.personId })
		.execute();
	return id;
}

/** The documents that a material's rows cite belong to it from now on, the sheet itself included. */
async function citeDocuments(
	trx: Trx,
	actor: Actor,
	record: ImportRecord,
	materialId: string,
	material: JudgedMaterial
): Promise<void> {
	const cited = new Set(material.rows.map(({ documentId }) => documentId ?? record.documentId));
	const attached = await trx
		.selectFrom('document_link')
		.select('document_id')
		.where('subject_kind', '=', 'material')
		.where('subject_id', '=', materialId)
		.where('withdrawn_at', 'is', null)
		.execute();
	for (const { document_id: documentId } of attached) cited.delete(documentId);
	for (const documentId of cited) {
		await insertLink(trx, documentId, { kind: 'material', id: materialId }, actor.personId);
	}
}

/** Releases in the order of the sheet, and tells how far it is: each release looks at every product that weighs the material. */
async function releaseAll(
	trx: Trx,
	actor: Actor,
	record: ImportRecord,
	made: readonly MadeVersion[],
	onprogress: OnProgress
): Promise<void> {
	for (const [at, { code, number }] of made.entries()) {
		if (at % TOLD_EVERY === 0) onprogress(at, made.length);
		await releaseDraft(trx, actor, code, number, record.effectiveFrom ?? today());
	}
}
