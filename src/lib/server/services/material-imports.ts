import type { CommitImport, ImportCells, Mend } from '$lib/schemas/material-import';
import type { Page } from '$lib/schemas/paging';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit, WORKSPACE_SUBJECT } from '../audit/audit';
import { today } from '../clock';
import { documentById } from '../db/documents';
import {
	importById,
	importRow,
	importRows,
	insertImport,
	listImports,
	lockImport,
	pageOfRows,
	putRows,
	removeRows,
	updateImport,
	type ImportRecord,
	type StoredRow
} from '../db/material-imports';
import { withActor } from '../db/with-actor';
import { enqueue } from '../jobs/queue';
import { Refused } from '../refused';
import { judgeRows, rowOf } from './material-import-judging';

const WORKSPACE = { kind: 'workspace', id: WORKSPACE_SUBJECT } as const;

/** Begins the import of a sheet that is filed as evidence; the worker reads it. */
export function beginImport(actor: Actor, documentId: string): Promise<string> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const { fileName } = await documentById(trx, documentId);
		const id = await insertImport(trx, { documentId, fileName, personId: actor.personId });
		const jobId = await enqueue(trx, actor, 'read-material-import', id, { importId: id });
		await updateImport(trx, id, { jobId });
		await audit(trx, actor, {
			stream: WORKSPACE,
			action: 'import-begun',
			subject: `material-import/${id}`,
			after: { fileName, documentId }
		});
		return id;
	});
}

export function readImports(actor: Actor, page: number): Promise<Page<ImportRecord>> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, (trx) => listImports(trx, page));
}

export interface ImportView {
	readonly record: ImportRecord;
	readonly rows: Page<StoredRow>;
	readonly show: 'faulty' | 'all';
}

/** An import with a page of its rows; the faulty ones while there are any, unless all are asked for. */
export function readImport(
	actor: Actor,
	id: string,
	{ show, page }: { readonly show: 'faulty' | 'all' | null; readonly page: number }
): Promise<ImportView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const record = await importById(trx, id);
		const shown = show ?? (record.faultyRows > 0 ? 'faulty' : 'all');
		return { record, show: shown, rows: await pageOfRows(trx, id, shown === 'faulty', page) };
	});
}

export function allImportRows(
	actor: Actor,
	id: string
): Promise<{ readonly record: ImportRecord; readonly rows: readonly StoredRow[] }> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => ({
		record: await importById(trx, id),
		rows: await importRows(trx, id, 'all')
	}));
}

/** Puts other texts into a row's cells and judges every row of the materials it belonged and belongs to. */
export function mendRow(actor: Actor, id: string, { number, cells }: Mend): Promise<void> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		const record = await lockImport(trx, id, 'judged');
		const before = await importRow(trx, id, number);
		const after = mended(before, cells);
		const rows = await importRows(trx, id, [before.code, after.code]);
		const judged = await judgeRows(
			trx,
			record,
			rows.map((row) => rowOf(row.number === number ? after : row))
		);
		await putRows(trx, id, judged.rows);
		await updateImport(trx, id, {});
		await audit(trx, actor, {
			stream: WORKSPACE,
			action: 'import-row-mended',
			subject: `material-import/${id}`,
			before: { number, cells: before.cells },
			after: { number, cells: after.cells }
		});
	});
}

function mended(row: StoredRow, typed: ImportCells): StoredRow {
	const changed = Object.entries(typed).filter(
		([column, text]) => (row.cells[column as keyof ImportCells] ?? '') !== text.trim()
	);
	const cells: ImportCells = { ...row.cells, ...Object.fromEntries(changed.map(([c, text]) => [c, text.trim()])) };
	const code = (cells.material_code ?? '').toUpperCase();
	return {
		...row,
		code,
		cells: { ...cells, material_code: code },
		faults: row.faults.filter(({ field }) => !changed.some(([column]) => column === field))
	};
}

/**
 * Hands the import to the worker, which makes all of its materials or none.
 * @throws Refused 'blocked' while a row is faulty, 'invalid' for an effective date without a release.
 */
export function commitImport(actor: Actor, id: string, { release, effectiveFrom }: CommitImport): Promise<string> {
	requireAct(actor, 'editMaterial');
	if (release === 'release') requireAct(actor, 'releaseMaterial');
	return withActor(actor, async (trx) => {
		const record = await lockImport(trx, id, 'judged');
		if (record.faultyRows > 0) throw new Refused('blocked', { faultyRows: record.faultyRows });
		const jobId = await enqueue(trx, actor, 'commit-material-import', id, { importId: id });
		await updateImport(trx, id, {
			state: 'committing',
			jobId,
			release: release === 'release',
			effectiveFrom: release === 'release' ? (effectiveFrom ?? today()) : null
		});
		return jobId;
	});
}

/** Gives the import up; the sheet stays filed. */
export function discardImport(actor: Actor, id: string): Promise<void> {
	requireAct(actor, 'editMaterial');
	return withActor(actor, async (trx) => {
		await lockImport(trx, id, 'judged', 'unreadable');
		await removeRows(trx, id);
		await updateImport(trx, id, { state: 'discarded' });
		await audit(trx, actor, { stream: WORKSPACE, action: 'import-discarded', subject: `material-import/${id}` });
	});
}
