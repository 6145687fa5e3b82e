import { listProjection, type Projection } from '$lib/domain/change/projection';
import { compose } from '$lib/domain/composition/compose';
import type { Composition, CompositionFault } from '$lib/domain/composition/types';
import { ingredientList } from '$lib/domain/ingredients/list';
import type { IngredientList, ListRequest, Market, SubstanceIdentity } from '$lib/domain/ingredients/types';
import type { Id, IsoDate } from '$lib/domain/quantity/units';
import { ALLERGENS, NAME_BOOK } from '$lib/reference';
import {
	answeringFormulaVersion,
	loadFormula,
	type FormulaVersionRef,
	type LoadedMaterials,
	type MaterialVersionRef,
	type Tree
} from '../db/basis';
import { listDecisions } from '../db/list-decisions';
import type { ProductRow } from '../db/products';
import type { Trx } from '../db/with-actor';
import { contentHash, sha256 } from '../hash';

/** Which released versions answer for a product on a day; every reading and every print names it. */
export interface Basis {
	readonly batchDay: IsoDate;
	readonly formulaVersion: FormulaVersionRef;
	readonly formulaVersions: ReadonlyMap<string, FormulaVersionRef>;
	readonly materials: ReadonlyMap<string, MaterialVersionRef>;
	readonly hash: string;
}

export type Reading =
	| { readonly kind: 'nothingReleased' }
	| { readonly kind: 'faults'; readonly basis: Basis; readonly faults: readonly CompositionFault[] }
	| {
			readonly kind: 'reading';
			readonly basis: Basis;
			readonly tree: Tree;
			readonly loaded: LoadedMaterials;
			readonly substances: ReadonlyMap<Id<'substance'>, SubstanceIdentity>;
			readonly composition: Composition;
			readonly list: IngredientList;
			/** An officer's order is kept for this list. */
			readonly arranged: boolean;
	  };

/** Composition and one market's list of a product from the versions that answer for it on the batch day. */
export async function readProduct(
	trx: Trx,
	product: ProductRow,
	batchDay: IsoDate,
	market: Market = 'EU'
): Promise<Reading> {
	return read(trx, product, batchDay, await wantedOf(trx, product, market));
}

/** As readProduct, with an order that somebody wishes in place of the kept one. */
export async function readArranged(
	trx: Trx,
	product: ProductRow,
	batchDay: IsoDate,
	market: Market,
	arrangement: readonly string[]
): Promise<Reading> {
	const { leftOutCarryOver } = await listDecisions(trx, product.id, market);
	return read(trx, product, batchDay, { market, leftOutCarryOver, arrangement, arrangementIs: 'kept' });
}

type Wanted = Pick<ListRequest, 'market' | 'leftOutCarryOver' | 'arrangement' | 'arrangementIs'>;

/** As readProduct, as if this version of a formula were released already. */
export async function readWith(
	trx: Trx,
	product: ProductRow,
	batchDay: IsoDate,
	market: Market,
	instead: FormulaVersionRef
): Promise<Reading> {
	return read(trx, product, batchDay, await wantedOf(trx, product, market), instead);
}

async function wantedOf(trx: Trx, product: ProductRow, market: Market): Promise<Wanted> {
	const { arrangement, leftOutCarryOver } = await listDecisions(trx, product.id, market);
	return { market, leftOutCarryOver, ...(arrangement ? { arrangement, arrangementIs: 'kept' } : {}) };
}

async function read(
	trx: Trx,
	product: ProductRow,
	batchDay: IsoDate,
	wanted: Wanted,
	instead?: FormulaVersionRef
): Promise<Reading> {
	const stands = instead?.formulaId === product.formulaId && product.pinnedVersionId === null ? instead : null;
	const version = stands ?? (await answeringFormulaVersion(trx, product.formulaId, product.pinnedVersionId));
	if (!version) return { kind: 'nothingReleased' };
	const { tree, loaded } = await loadFormula(trx, version, batchDay, instead);
	const basis = basisOf(version, tree, loaded, batchDay);
	const outcome = compose({
		formula: version.formulaId as Id<'formula'>,
		formulas: tree.formulas,
		materials: loaded.materials
	});
	if (!outcome.ok) return { kind: 'faults', basis, faults: outcome.faults };
	const list = ingredientList(outcome.value, {
		...wanted,
		stay: product.stay,
		batchDay,
		substances: loaded.substances,
		allergens: ALLERGENS[wanted.market],
		names: NAME_BOOK
	});
	return {
		kind: 'reading',
		basis,
		tree,
		loaded,
		substances: loaded.substances,
		composition: outcome.value,
		list,
		arranged: wanted.arrangement !== undefined
	};
}

function basisOf(version: FormulaVersionRef, tree: Tree, loaded: LoadedMaterials, batchDay: IsoDate): Basis {
	const content = {
		formulas: [...tree.versions.values()].map((each) => each.id).sort(),
		materials: [...loaded.refs.values()].map((each) => each.versionId).sort()
	};
	return {
		batchDay,
		formulaVersion: version,
		formulaVersions: tree.versions,
		materials: loaded.refs,
		hash: contentHash(content)
	};
}

export interface HashedProjection extends Projection {
	readonly hash: string;
}

/** What a product's EU list rests on now; a list that cannot be made has its own text, so that copies notice. */
export function projectionOf(reading: Reading): HashedProjection {
	const projection =
		reading.kind === 'reading'
			? listProjection(reading.list)
			: { kind: 'list', subject: 'EU', rev: 1, text: JSON.stringify({ none: reading.kind }) };
	return { ...projection, hash: sha256(projection.text) };
}
