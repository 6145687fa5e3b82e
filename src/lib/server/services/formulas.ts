import { compose } from '$lib/domain/composition/compose';
import type { CompositionFault } from '$lib/domain/composition/types';
import type { AllergenEntry, Market, NameBook } from '$lib/domain/ingredients/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { LINE_DECIMALS, type Id, type IsoDate } from '$lib/domain/quantity/units';
import { ALLERGENS, NAME_BOOK } from '$lib/reference';
import { readShare, type FormulaDraft, type NewFormula } from '$lib/schemas/formula';
import type { BulkTree, LineView, MaterialView, Suggestion } from '$lib/schemas/grid-view';
import type { ListQuery, Page } from '$lib/schemas/paging';
import type { TrialView } from '$lib/schemas/trial';
import { requireAct } from '../access/acts';
import type { Actor } from '../access/actor';
import { audit } from '../audit/audit';
import { today } from '../clock';
import { formulaOfKey, loadFormula, type FormulaVersionRef } from '../db/basis';
import { familyOf } from '../db/families';
import {
	findBulks,
	findMaterials,
	formulaByCode,
	linesOfVersion,
	listFormulas,
	lockFormulaDraft,
	productsOfFormula,
	versionRef,
	versionsOfFormula,
	type FormulaHead,
	type FormulaListRow,
	type FormulaVersionRow
} from '../db/formulas';
import { newId } from '../db/id';
import { formulaCodes } from '../db/reasons';
import { trialsOf } from '../db/trials';
import { withActor, type Trx } from '../db/with-actor';
import { contentHash } from '../hash';
import { Refused } from '../refused';
import { bulkTree, materialViews, treeBelow } from './formula-tree';
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
	/** Every bulk of the tree. */
	readonly bulks: BulkTree['bulks'];
	readonly trials: readonly TrialView[];
	/** Formulas that take this one in as a bulk. */
	readonly variants: readonly { readonly code: string; readonly name: string }[];
	readonly products: Awaited<ReturnType<typeof productsOfFormula>>;
	readonly batchDay: IsoDate;
	/** For the lists that the grid computes in the browser. */
	readonly allergens: Readonly<Record<Market, readonly AllergenEntry[]>>;
	readonly names: NameBook;
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
		const tree = await treeBelow(trx, [...lines, ...(before?.lines ?? [])]);
		return {
			formula,
			versions,
			version,
			lines,
			before,
			...tree,
			trials: await trialsOf(trx, formula.id),
			variants: (await familyOf(trx, formula.id)).map(({ code, name }) => ({ code, name })),
			products: await productsOfFormula(trx, formula.id),
			batchDay: today(),
			allergens: ALLERGENS,
			names: NAME_BOOK
		};
	});
}

/** What the grid offers for a typed name, code or INCI: materials, and formulas that can be a bulk of this one. */
export function suggestLines(actor: Actor, text: string, forCode: string): Promise<readonly Suggestion[]> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, async (trx) => {
		const found = await findMaterials(trx, text);
		const views = await materialViews(
			trx,
			found.map((material) => material.code)
		);
		const materials = found.flatMap(({ code }) => views.find((view) => view.code === code) ?? []);
		const bulks = await findBulks(trx, text, forCode);
		return [
			...materials.map((material) => ({ kind: 'material', material }) as const),
			...bulks.map((bulk) => ({ kind: 'formula', ...bulk }) as const)
		];
	});
}

/** A bulk with everything below it, by the version named or the newest one. @throws Refused 'not-found'. */
export function readBulk(actor: Actor, code: string, number: number | null): Promise<BulkTree> {
	requireAct(actor, 'readLaboratory');
	return withActor(actor, (trx) => bulkTree(trx, code, number));
}

/** Opens the next draft with the lines of the newest version. @throws Refused 'exists' when a draft is open. */
export function draftFormula(actor: Actor, code: string): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const [newest] = await versionsOfFormula(trx, formula.id);
		if (!newest) throw new Refused('not-found');
		if (newest.state === 'draft') throw new Refused('exists', { field: 'draft', value: newest.number });
		return openDraft(trx, actor, formula.id, newest);
	});
}

/** A draft behind the newest version, with its lines; its number. */
export async function openDraft(
	trx: Trx,
	actor: Actor,
	formulaId: string,
	newest: Pick<FormulaVersionRow, 'id' | 'number'>
): Promise<number> {
	const number = newest.number + 1;
	const draftId = await insertDraft(trx, actor, formulaId, number);
	const rows = await trx.selectFrom('formula_line').selectAll().where('formula_version_id', '=', newest.id).execute();
	if (rows.length > 0) {
		await trx
			.insertInto('formula_line')
			.values(rows.map((row) => ({ ...row, id: newId(), formula_version_id: draftId })))
			.execute();
	}
	await audit(trx, actor, {
		stream: { kind: 'formula', id: formulaId },
		action: 'draft-opened',
		subject: `formula-version/${draftId}`,
		after: { number }
	});
	return number;
}

/** Saves the whole grid. @throws Refused 'conflict' with the lines somebody else saved, 'invalid' for an unknown code. */
export function saveFormulaDraft(actor: Actor, code: string, number: number, draft: FormulaDraft): Promise<number> {
	requireAct(actor, 'editFormula');
	return withActor(actor, async (trx) => {
		const formula = await formulaByCode(trx, code);
		const version = await lockFormulaDraft(trx, formula.id, number);
		if (version.rev !== draft.rev)
			throw new Refused('conflict', { rev: version.rev, theirs: await linesOfVersion(trx, version.id) });
		return draftLines(trx, actor, formula.id, version, draft.lines, { action: 'draft-saved', after: draft.lines });
	});
}

/** Puts these lines in place of a locked draft's; its next rev. */
export async function draftLines(
	trx: Trx,
	actor: Actor,
	formulaId: string,
	version: { readonly id: string; readonly rev: number },
	lines: FormulaDraft['lines'],
	{ action, after }: { readonly action: string; readonly after: object }
): Promise<number> {
	const before = await linesOfVersion(trx, version.id);
	await trx.deleteFrom('formula_line').where('formula_version_id', '=', version.id).execute();
	await insertLines(trx, version.id, lines);
	const rev = version.rev + 1;
	await trx.updateTable('formula_version').set({ rev }).where('id', '=', version.id).execute();
	await audit(trx, actor, {
		stream: { kind: 'formula', id: formulaId },
		action,
		subject: `formula-version/${version.id}`,
		before,
		after
	});
	return rev;
}

async function insertLines(trx: Trx, versionId: string, lines: FormulaDraft['lines']): Promise<void> {
	if (lines.length === 0) return;
	const materials = await idsByCode(trx, 'material', lines);
	const formulas = await idsByCode(trx, 'formula', lines);
	const unknown = lines.flatMap((line, index) => {
		const known = (line.kind === 'material' ? materials : formulas).has(line.code);
		return known ? [] : [{ path: `lines.${index}.code`, value: line.code, why: 'unknownCode', limit: null }];
	});
	const pins = await pinnedVersions(trx, lines, formulas);
	const unpinned = lines.flatMap((line, index) =>
		line.pinned === null || pins.has(pinKey(line))
			? []
			: [{ path: `lines.${index}.pinned`, value: String(line.pinned), why: 'unknownVersion', limit: null }]
	);
	if (unknown.length + unpinned.length > 0) throw new Refused('invalid', { faults: [...unknown, ...unpinned] });
	await trx
		.insertInto('formula_line')
		.values(
			lines.map((line, position) => {
				return {
					id: line.id,
					formula_version_id: versionId,
					position,
					phase: line.phase,
					material_id: line.kind === 'material' ? (materials.get(line.code) ?? null) : null,
					formula_id: line.kind === 'formula' ? (formulas.get(line.code) ?? null) : null,
					pinned_version_id: pins.get(pinKey(line)) ?? null,
					pin_reason: line.pinned === null ? null : line.pinReason,
					share_min: line.qs ? null : canonicalShare(line.min),
					share: line.qs ? null : canonicalShare(line.percent),
					share_max: line.qs ? null : canonicalShare(line.max),
					is_qs: line.qs
				};
			})
		)
		.execute();
}

function canonicalShare(text: string): string | null {
	const parsed = readShare(text);
	return parsed.ok ? formatExact(parsed.value, LINE_DECIMALS) : null;
}

const pinKey = (line: Pick<FormulaDraft['lines'][number], 'code' | 'pinned'>) => `${line.code} ${line.pinned}`;

/** The released versions that lines pin, by pinKey. */
async function pinnedVersions(trx: Trx, lines: FormulaDraft['lines'], formulas: ReadonlyMap<string, string>) {
	const found = new Map<string, string>();
	for (const line of lines) {
		const formulaId = formulas.get(line.code);
		if (line.kind !== 'formula' || line.pinned === null || !formulaId) continue;
		const version = (await versionsOfFormula(trx, formulaId)).find(
			({ number, state }) => number === line.pinned && state === 'released'
		);
		if (version) found.set(pinKey(line), version.id);
	}
	return found;
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
		if (version.rev !== rev)
			throw new Refused('conflict', { rev: version.rev, theirs: await linesOfVersion(trx, version.id) });
		const faults = await faultsOf(trx, versionRef(formula.id, { ...version, releasedAt: null }));
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

async function faultsOf(trx: Trx, version: FormulaVersionRef) {
	const { tree, loaded } = await loadFormula(trx, version, today());
	const outcome = compose({
		formula: version.formulaId as Id<'formula'>,
		formulas: tree.formulas,
		materials: loaded.materials
	});
	if (outcome.ok) return [];
	const codes = await formulaCodes(
		trx,
		outcome.faults.flatMap((fault) => (fault.kind === 'cycle' ? fault.path.map(formulaOfKey) : []))
	);
	return outcome.faults.map((fault) => ({
		...plainFault(fault),
		path: fault.kind === 'cycle' ? fault.path.map((key) => codes.get(formulaOfKey(key)) ?? '') : null
	}));
}

const plainFault = (fault: CompositionFault) => ({
	kind: fault.kind,
	by: 'by' in fault ? formatExact(fault.by, LINE_DECIMALS) : null
});
