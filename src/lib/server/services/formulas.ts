import { compose } from '$lib/domain/composition/compose';
import type { CompositionFault } from '$lib/domain/composition/types';
import type { AllergenEntry } from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { LINE_DECIMALS, type Id, type IsoDate } from '$lib/domain/quantity/units';
import { EU_ALLERGENS } from '$lib/reference';
import { readShare, type FormulaDraft, type NewFormula } from '$lib/schemas/formula';
import type { LineView, MaterialView } from '$lib/schemas/grid-view';
import type { ListQuery, Page } from '$lib/schemas/paging';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { constituentsOf, loadMaterials, loadTree, type Tree } from '../db/basis';
import {
	findMaterials,
	formulaByCode,
	linesOfVersion,
	listFormulas,
	lockFormulaDraft,
	productsOfFormula,
	versionsOfFormula,
	type FormulaHead,
	type FormulaListRow,
	type FormulaVersionRow
} from '../db/formulas';
import { newId } from '../db/id';
import { withActor, type Trx } from '../db/with-actor';
import { contentHash } from '../hash';
import { Refused } from '../refused';
import { moveProducts, type CopyEffect } from './moves';

export function readFormulas(actor: Actor, query: ListQuery): Promise<Page<FormulaListRow>> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, (trx) => listFormulas(trx, query));
}

/** @throws Refused 'exists'. */
export function createFormula(actor: Actor, input: NewFormula): Promise<string> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const id = newId();
		const { numInsertedOrUpdatedRows } = await trx
			.insertInto('formula')
			.values({ id, code: input.code, name: input.name, created_by: actor.personId })
			.onConflict((conflict) => conflict.column('code').doNothing())
			.executeTakeFirstOrThrow();
		if (!numInsertedOrUpdatedRows) throw new Refused('exists', { field: 'code', value: input.code });
		await insertDraft(trx, actor, id, 1);
		const stream = { kind: 'formula', id } as const;
		await audit(trx, actor, { stream, action: 'formula-created', subject: `formula/${id}`, after: input });
		return input.code;
	});
}

async function insertDraft(trx: Trx, actor: Actor, formulaId: string, number: number): Promise<string> {
	const id = newId();
	await trx
		.insertInto('formula_version')
		.values({ id, formula_id: formulaId, number, state: 'draft', created_by: actor.personId })
		.execute();
	return id;
}

export interface FormulaView {
	readonly formula: FormulaHead;
	readonly versions: readonly FormulaVersionRow[];
	readonly version: FormulaVersionRow;
	readonly lines: readonly LineView[];
	/** The newest released version's lines, for a draft to be compared with. */
	readonly before: { readonly number: number; readonly lines: readonly LineView[] } | null;
	readonly materials: readonly MaterialView[];
	readonly products: Awaited<ReturnType<typeof productsOfFormula>>;
	readonly batchDay: IsoDate;
	/** For the list that the grid computes in the browser. */
	readonly allergens: readonly AllergenEntry[];
}

export function readFormula(actor: Actor, code: string, number: number | null): Promise<FormulaView> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const versions = await versionsOfFormula(trx, formula.id);
		const version = number === null ? versions[0] : versions.find((each) => each.number === number);
		if (!version) throw new Refused('not-found');
		const lines = await linesOfVersion(trx, version.id);
		const released = versions.find((each) => each.state === 'released' && each.number < version.number);
		const before = released ? { number: released.number, lines: await linesOfVersion(trx, released.id) } : null;
		const codes = [
			...new Set([...lines, ...(before?.lines ?? [])].flatMap((line) => (line.kind === 'material' ? line.code : [])))
		];
		return {
			formula,
			versions,
			version,
			lines,
			before,
			materials: await materialViews(trx, codes),
			products: await productsOfFormula(trx, formula.id),
			batchDay: today(),
			allergens: EU_ALLERGENS
		};
	});
}

/** What the grid offers for a typed name, code or INCI. */
export function suggestMaterials(actor: Actor, text: string): Promise<readonly MaterialView[]> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const found = await findMaterials(trx, text);
		const views = await materialViews(
			trx,
			found.map((material) => material.code)
		);
		return found.flatMap(({ code }) => views.find((view) => view.code === code) ?? []);
	});
}

async function materialViews(trx: Trx, codes: readonly string[]): Promise<MaterialView[]> {
	if (codes.length === 0) return [];
	const ids = await trx
		.selectFrom('material')
		.select('id')
		.where('code', 'in', [...codes])
		.execute();
	const { refs } = await loadMaterials(
		trx,
		ids.map((row) => row.id),
		today()
	);
	const rows = await constituentsOf(
		trx,
		[...refs.values()].map((ref) => ref.versionId)
	);
	return [...refs.values()].map((ref) => {
		const own = rows.filter((row) => row.material_version_id === ref.versionId);
		return {
			id: ref.materialId,
			versionId: ref.versionId,
			code: ref.code,
			name: ref.tradeName,
			supplier: ref.supplier,
			number: ref.number,
			documented: own.filter((row) => row.source_document_id !== null).length,
			constituents: own.map((row) => ({
				id: row.id,
				substance: row.substance_id,
				inci: row.inci,
				key: row.name_key,
				cas: row.substance_cas,
				colourIndex: row.colour_index,
				place: row.place,
				role: row.role,
				parent: row.parent_id,
				use: row.use,
				nano: row.nano,
				low: row.low,
				typical: row.typical,
				high: row.high,
				highOpen: row.high_open
			}))
		};
	});
}

/** Opens the next draft with the lines of the newest version. @throws Refused 'exists' when a draft is open. */
export function draftFormula(actor: Actor, code: string): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const [newest] = await versionsOfFormula(trx, formula.id);
		if (!newest) throw new Refused('not-found');
		if (newest.state === 'draft') throw new Refused('exists', { field: 'draft', value: newest.number });
		const number = newest.number + 1;
		const draftId = await insertDraft(trx, actor, formula.id, number);
		const rows = await trx.selectFrom('formula_line').selectAll().where('formula_version_id', '=', newest.id).execute();
		if (rows.length > 0) {
			await trx
				.insertInto('formula_line')
				.values(rows.map((row) => ({ ...row, id: newId(), formula_version_id: draftId })))
				.execute();
		}
		const stream = { kind: 'formula', id: formula.id } as const;
		await audit(trx, actor, {
			stream,
			action: 'draft-opened',
			subject: `formula-version/${draftId}`,
			after: { number }
		});
		return number;
	});
}

/** Saves the whole grid. @throws Refused 'conflict' with the lines somebody else saved, 'invalid' for an unknown code. */
export function saveFormulaDraft(actor: Actor, code: string, number: number, draft: FormulaDraft): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const version = await lockFormulaDraft(trx, formula.id, number);
		const before = await linesOfVersion(trx, version.id);
		if (version.rev !== draft.rev) throw new Refused('conflict', { rev: version.rev, theirs: before });
		await trx.deleteFrom('formula_line').where('formula_version_id', '=', version.id).execute();
		await insertLines(trx, version.id, draft);
		const rev = version.rev + 1;
		await trx.updateTable('formula_version').set({ rev }).where('id', '=', version.id).execute();
		await audit(trx, actor, {
			stream: { kind: 'formula', id: formula.id },
			action: 'draft-saved',
			subject: `formula-version/${version.id}`,
			before,
			after: draft.lines
		});
		return rev;
	});
}

async function insertLines(trx: Trx, versionId: string, { lines }: FormulaDraft): Promise<void> {
	if (lines.length === 0) return;
	const materials = await idsByCode(trx, 'material', lines);
	const formulas = await idsByCode(trx, 'formula', lines);
	const unknown = lines.flatMap((line, index) => {
		const known = (line.kind === 'material' ? materials : formulas).has(line.code);
		return known ? [] : [{ path: `lines.${index}.code`, value: line.code, why: 'unknownCode', limit: null }];
	});
	if (unknown.length > 0) throw new Refused('invalid', { faults: unknown });
	await trx
		.insertInto('formula_line')
		.values(
			lines.map((line, position) => {
				const share = readShare(line.percent);
				return {
					id: line.id,
					formula_version_id: versionId,
					position,
					phase: line.phase,
					material_id: line.kind === 'material' ? (materials.get(line.code) ?? null) : null,
					formula_id: line.kind === 'formula' ? (formulas.get(line.code) ?? null) : null,
					share: line.qs || !share.ok ? null : formatExact(share.value, LINE_DECIMALS),
					is_qs: line.qs
				};
			})
		)
		.execute();
}

async function idsByCode(trx: Trx, table: 'material' | 'formula', lines: FormulaDraft['lines']) {
	const codes = lines.flatMap((line) => (line.kind === table ? line.code : []));
	if (codes.length === 0) return new Map<string, string>();
	const rows = await trx.selectFrom(table).select(['id', 'code']).where('code', 'in', codes).execute();
	return new Map(rows.map((row) => [row.code, row.id]));
}

export interface ReleasedFormula {
	readonly number: number;
	readonly effects: readonly CopyEffect[];
}

/**
 * Freezes the draft and carries what it moves to every product.
 * @throws Refused 'blocked' with the faults: a sum that is not 100, a material without a released version, a cycle.
 */
export function releaseFormula(actor: Actor, code: string, number: number, rev: number): Promise<ReleasedFormula> {
	requireAct(actor, 'releaseFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const version = await lockFormulaDraft(trx, formula.id, number);
		if (version.rev !== rev) throw new Refused('conflict', { rev: version.rev });
		const tree = await loadTree(trx, { id: version.id, formulaId: formula.id, number, releasedAt: new Date() });
		const faults = await faultsOf(trx, formula.id, tree);
		if (faults.length > 0) throw new Refused('blocked', { faults });
		const lines = await linesOfVersion(trx, version.id);
		await trx
			.updateTable('formula_version')
			.set({
				state: 'released',
				content_hash: contentHash(lines.map(({ id: _id, name: _name, ...line }) => line)),
				released_at: new Date(),
				released_by: actor.personId
			})
			.where('id', '=', version.id)
			.execute();
		await audit(trx, actor, {
			stream: { kind: 'formula', id: formula.id },
			action: 'version-released',
			subject: `formula-version/${version.id}`,
			after: { number }
		});
		const label = `${formula.name}, version ${number}`;
		const cause = { kind: 'formula', versionId: version.id, formulaId: formula.id, label } as const;
		return { number, effects: await moveProducts(trx, actor, cause) };
	});
}

async function faultsOf(trx: Trx, formulaId: string, tree: Tree) {
	const ids = [
		...new Set([...tree.formulas.values()].flatMap(({ lines }) => lines.flatMap((line) => line.material ?? [])))
	];
	const { materials } = await loadMaterials(trx, ids, today());
	const outcome = compose({ formula: formulaId as Id<'formula'>, formulas: tree.formulas, materials });
	return outcome.ok ? [] : outcome.faults.map(plainFault);
}

const plainFault = (fault: CompositionFault) => ({
	kind: fault.kind,
	by: 'by' in fault ? formatExact(fault.by, LINE_DECIMALS) : null
});
