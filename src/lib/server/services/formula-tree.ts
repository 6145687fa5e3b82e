import type { BulkTree, BulkView, LineView, MaterialView } from '$lib/schemas/grid-view';
import { today } from '../clock';
import { constituentsOf, loadMaterials } from '../db/basis';
import { formulaByCode, linesOfVersion, versionsOfFormula } from '../db/formulas';
import type { Trx } from '../db/with-actor';
import { Refused } from '../refused';

/** Bulks and materials below some lines, at any depth; a bulk that stands twice is read once. */
export async function treeBelow(trx: Trx, lines: readonly LineView[]): Promise<BulkTree> {
	const bulks = new Map<string, BulkView>();
	let pending = lines;
	while (pending.length > 0) {
		const next: LineView[] = [];
		for (const line of pending) {
			const key = `${line.code} ${line.pinned}`;
			if (line.kind !== 'formula' || bulks.has(key)) continue;
			const bulk = await bulkOf(trx, line.code, line.pinned);
			if (!bulk) continue;
			bulks.set(key, bulk);
			next.push(...bulk.lines);
		}
		pending = next;
	}
	const all = [...lines, ...[...bulks.values()].flatMap((bulk) => bulk.lines)];
	const codes = [...new Set(all.flatMap((line) => (line.kind === 'material' ? line.code : [])))];
	return { bulks: [...bulks.values()], materials: await materialViews(trx, codes) };
}

/** @throws Refused 'not-found' for a formula or version that is not released. */
export async function bulkTree(trx: Trx, code: string, number: number | null): Promise<BulkTree> {
	const bulk = await bulkOf(trx, code, number);
	if (!bulk) throw new Refused('not-found');
	const below = await treeBelow(trx, bulk.lines);
	return { bulks: [bulk, ...below.bulks], materials: below.materials };
}

async function bulkOf(trx: Trx, code: string, number: number | null): Promise<BulkView | null> {
	const formula = await formulaByCode(trx, code);
	const released = (await versionsOfFormula(trx, formula.id)).filter(({ state }) => state === 'released');
	const version = number === null ? released[0] : released.find((each) => each.number === number);
	if (!version) return null;
	return {
		id: formula.id,
		code,
		name: formula.name,
		number: version.number,
		pinned: number,
		released: released.map((each) => each.number),
		lines: await linesOfVersion(trx, version.id)
	};
}

export async function materialViews(trx: Trx, codes: readonly string[]): Promise<MaterialView[]> {
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
