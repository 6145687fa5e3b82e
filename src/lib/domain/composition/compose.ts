import { resolveMaterial } from '../material/resolve';
import type { ResolvedMaterial } from '../material/types';
import type { Estimate } from '../quantity/range';
import { good, LINE_DECIMALS, PERCENT_DECIMALS, share, type Id, type LineShare, type Outcome } from '../quantity/units';
import { amountOf, extremes } from './amounts';
import { expand, type Leaf } from './expand';
import { corners, judgeAmounts, sharesOf, type Shares } from './lines';
import type {
	Composition,
	CompositionFault,
	CompositionRequest,
	CompositionRow,
	Contribution,
	WeighedMaterial,
	WeighedPart
} from './types';

/** Raised when the way of computing changes. */
const ENGINE = 1;
const PER_LEVEL = 8;

/**
 * What a formula consists of, by substance, nano form and use: typical, lowest and highest share and every contribution.
 * Materials and bulks at any depth are multiplied out exactly; nothing is rounded (see Composition for the scale).
 * Faults: what is missing, a cycle with its path, a sum that is not exactly 100, a material that contradicts itself.
 */
export function compose(request: CompositionRequest): Outcome<Composition, CompositionFault> {
	const expanded = expand(request);
	if (!expanded.ok) return expanded;
	const { leaves, formulas, levels } = expanded.value;
	const amounts = judgeAmounts(formulas);
	if (amounts.length > 0) return { ok: false, faults: amounts };
	const materials = resolveAll(request, leaves);
	if (!materials.ok) return materials;

	const typical = sharesOf(formulas, null);
	const boxes = corners(formulas);
	const weigh = (leaf: Leaf, shares: Shares) => weightOf(leaf, shares, levels);
	const present = leaves.filter((leaf) => boxes.some((shares) => weigh(leaf, shares) > 0n));
	const weighed = [...materials.value.values()].flatMap((material) =>
		weighMaterial(material, present, typical, boxes, weigh)
	);
	const contributions = present.flatMap((leaf) =>
		contribute(leaf, materials.value.get(leaf.material), typical, boxes, weigh)
	);
	return good({
		formula: request.formula,
		levels,
		shareDecimals: PERCENT_DECIMALS + PER_LEVEL * levels,
		weightDecimals: LINE_DECIMALS + PER_LEVEL * levels,
		rows: rowsOf(contributions, weighed),
		weighed,
		engine: ENGINE
	});
}

export const rowKey = (part: { substance: string; nano: boolean; use: string }) =>
	`${part.substance}|${part.nano ? 'nano' : ''}|${part.use}`;

function resolveAll(
	request: CompositionRequest,
	leaves: readonly Leaf[]
): Outcome<ReadonlyMap<Id<'material'>, ResolvedMaterial>, CompositionFault> {
	const found = new Map<Id<'material'>, ResolvedMaterial>();
	const faults: CompositionFault[] = [];
	for (const material of new Set(leaves.map((leaf) => leaf.material))) {
		const version = request.materials.get(material);
		if (!version) {
			faults.push({ kind: 'materialMissing', material });
			continue;
		}
		const outcome = resolveMaterial(version);
		if (outcome.ok) found.set(material, outcome.value);
		else {
			faults.push(
				...outcome.faults.map((fault) => ({ kind: 'material', material, version: version.id, fault }) as const)
			);
		}
	}
	return faults.length > 0 ? { ok: false, faults } : good(found);
}

/** The product of the shares along the path, on the composition's weight scale. */
function weightOf(leaf: Leaf, shares: Shares, levels: number): LineShare {
	const product = leaf.path.reduce((total, line) => total * (shares.get(line) ?? 0n), 1n);
	const missingLevels = levels - (leaf.path.length - 1);
	return (product * 10n ** BigInt(PER_LEVEL * missingLevels)) as LineShare;
}

type Weigh = (leaf: Leaf, shares: Shares) => LineShare;

function weighMaterial(
	material: ResolvedMaterial,
	leaves: readonly Leaf[],
	typical: Shares,
	boxes: readonly Shares[],
	weigh: Weigh
): WeighedMaterial[] {
	const own = leaves.filter((leaf) => leaf.material === material.material);
	if (own.length === 0) return [];
	const total = (shares: Shares) => own.reduce((sum, leaf) => sum + weigh(leaf, shares), 0n) as LineShare;
	return [
		{
			material: material.material,
			version: material.version,
			typicalWeight: total(typical),
			corners: boxes.map(total),
			parts: material.parts.map((part): WeighedPart => ({
				rowKey: rowKey(part.of),
				constituent: part.of.id,
				substance: part.of.substance,
				role: part.of.place === 'inSum' ? part.of.role : 'ofWhich',
				parent: part.of.place === 'ofWhich' ? part.of.parent : null,
				share: part.share
			}))
		}
	];
}

function contribute(
	leaf: Leaf,
	material: ResolvedMaterial | undefined,
	typical: Shares,
	boxes: readonly Shares[],
	weigh: Weigh
): readonly (Contribution & { readonly rowKey: string; readonly row: CompositionRowIdentity })[] {
	if (!material) return [];
	const bounds = extremes(boxes.map((shares) => weigh(leaf, shares)));
	const weight: Estimate<LineShare> = {
		low: bounds.low as LineShare,
		high: bounds.high as LineShare,
		highOpen: false,
		typical: weigh(leaf, typical),
		basis: 'declared'
	};
	return material.parts.map((part) => ({
		path: leaf.path,
		formulas: leaf.formulas,
		material: leaf.material,
		materialVersion: material.version,
		constituent: part.of.id,
		ofWhich: part.of.place === 'ofWhich',
		role: part.of.place === 'inSum' ? part.of.role : 'ofWhich',
		weight,
		part: part.share,
		share: {
			low: share(weight.low, part.share.low),
			high: share(weight.high, part.share.high),
			highOpen: part.share.highOpen,
			typical: share(weight.typical, part.share.typical),
			basis: part.share.basis
		},
		rowKey: rowKey(part.of),
		row: { substance: part.of.substance, nano: part.of.nano, use: part.of.use }
	}));
}

type CompositionRowIdentity = Pick<CompositionRow, 'substance' | 'nano' | 'use'>;

/** The materials that bring a row, so that no row looks through all of them. */
function carriersOf(weighed: readonly WeighedMaterial[]): ReadonlyMap<string, readonly WeighedMaterial[]> {
	const found = new Map<string, WeighedMaterial[]>();
	for (const material of weighed) {
		for (const key of new Set(material.parts.map((part) => part.rowKey))) {
			found.set(key, [...(found.get(key) ?? []), material]);
		}
	}
	return found;
}

function rowsOf(
	contributions: readonly (Contribution & { readonly rowKey: string; readonly row: CompositionRowIdentity })[],
	weighed: readonly WeighedMaterial[]
): CompositionRow[] {
	const grouped = new Map<string, { identity: CompositionRowIdentity; of: Contribution[] }>();
	for (const { rowKey: key, row, ...contribution } of contributions) {
		const group = grouped.get(key) ?? { identity: row, of: [] };
		group.of.push(contribution);
		grouped.set(key, group);
	}
	const carriers = carriersOf(weighed);
	return [...grouped].map(([key, { identity, of }]) => ({
		key,
		...identity,
		roles: new Set(of.map((contribution) => contribution.role)),
		share: amountOf(carriers.get(key) ?? [], (part) => part.rowKey === key),
		contributions: of
	}));
}
