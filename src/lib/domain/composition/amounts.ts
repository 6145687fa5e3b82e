import { jointBounds, type Box } from '../material/bounds';
import { weakest, type Estimate, type TypicalBasis } from '../quantity/range';
import { least, plus, sum, type PartShare, type Percent } from '../quantity/units';
import type { WeighedMaterial, WeighedPart } from './types';

export type Select = (part: WeighedPart) => boolean;

export const extremes = (values: readonly bigint[]) => ({
	low: values.reduce((a, b) => (a < b ? a : b)),
	high: values.reduce((a, b) => (a > b ? a : b))
});

/**
 * The share of the selected constituents together: typical, and the lowest and highest that can occur, jointly within each
 * material and over the corners of the range lines. Materials vary independently of one another. On the composition's scale.
 * A selected part of a part counts with its parent where the parent is selected too.
 */
export function amountOf(weighed: readonly WeighedMaterial[], select: Select): Estimate<Percent> {
	const materials = weighed
		.filter((material) => material.parts.some(select))
		.map((material) => ({ material, fraction: fractionOf(material, select) }));
	const typical = materials.reduce((total, each) => total + each.material.typicalWeight * each.fraction.typical, 0n);
	const corners = Array.from({ length: weighed[0]?.corners.length ?? 0 }, (_, corner) => {
		const at = materials.map(({ material, fraction }) => ({ weight: material.corners[corner] ?? 0n, fraction }));
		return {
			low: at.reduce((total, each) => total + each.weight * each.fraction.low, 0n),
			high: at.reduce((total, each) => total + each.weight * each.fraction.high, 0n),
			open: at.some((each) => each.weight > 0n && each.fraction.highOpen)
		};
	});
	const { high } = extremes([typical, ...corners.map((corner) => corner.high)]);
	return {
		low: extremes([typical, ...corners.map((corner) => corner.low)]).low as Percent,
		high: high as Percent,
		highOpen: high > typical && corners.every((corner) => corner.high < high || corner.open),
		typical: typical as Percent,
		basis: weakest(materials.flatMap(({ material }) => basesOf(material.parts.filter(select))))
	};
}

/** A figure that the sum leaves no room is as good as declared, whoever worked it out. */
const basesOf = (parts: readonly WeighedPart[]): TypicalBasis[] =>
	parts.flatMap(({ share }) => (share.low === share.high && share.basis === 'derived' ? [] : [share.basis]));

/** What the selected parts of one part in the sum can come to. */
interface Family {
	readonly part: WeighedPart;
	readonly selected: boolean;
	readonly children: readonly WeighedPart[];
	/** Least that the children not selected take of their parent. */
	readonly others: bigint;
}

/** Share of one material that the selected constituents make up together; the high is reached unless it is open. */
export function fractionOf(material: WeighedMaterial, select: Select): Estimate<PartShare> {
	const own = material.parts.filter(select);
	// A single constituent's own range is already the exact one.
	if (own.length === 1 && own[0]) return own[0].share;
	return jointFraction(material, select);
}

function jointFraction(material: WeighedMaterial, select: Select): Estimate<PartShare> {
	const families = material.parts
		.filter((part) => part.role !== 'ofWhich')
		.map((part) => familyOf(part, material, select));
	const reach = families.map(reachOf);
	const room = reach.flatMap((each) => each.boxes);
	const base = reach.reduce((total, each) => total + each.offset, 0n);
	const lowest = jointBounds(
		families.map(({ part, selected }) => ({ ...boxOf(part), counts: selected })),
		counted
	);
	const high = (jointBounds(room, counted)?.high ?? 0n) + base;
	const children = families.flatMap((family) => (family.selected ? [] : family.children));
	const most = reach.reduce((total, each) => total + each.most, 0n);
	const chosen = [...families.filter(({ selected }) => selected).map(({ part }) => part), ...children];
	return {
		low: plus((lowest?.low ?? 0n) as PartShare, sum(children.map(({ share }) => share.low))),
		high: high as PartShare,
		// With room to spare the same high is reached with every open part a little below its bound.
		highOpen: high === most ? reach.some((each) => each.open) : reach.some((each) => each.open && each.fixed),
		typical: sum(chosen.map(({ share }) => share.typical)),
		basis: weakest(basesOf(chosen))
	};
}

interface Counted extends Box {
	readonly counts: boolean;
}
const counted = (box: Counted) => (box.counts ? 1n : 0n);
const boxOf = ({ share }: WeighedPart): Box => ({ low: share.low, high: share.high });

function familyOf(part: WeighedPart, material: WeighedMaterial, select: Select): Family {
	const all = material.parts.filter((each) => each.parent === part.constituent);
	const others = all.filter((each) => !select(each)).reduce((total, each) => total + each.share.low, 0n);
	return { part, selected: select(part), children: all.filter(select), others };
}

/** How a family's selected amount can grow: a box that counts, a box that does not, and what the counted box is off by. */
interface Reach {
	readonly boxes: readonly Counted[];
	readonly offset: bigint;
	readonly most: bigint;
	readonly open: boolean;
	/** At its most whatever the rest of the material does. */
	readonly fixed: boolean;
}

/** Children grow with their parent until they stand at their own highs; beyond that the parent grows without them. */
function reachOf({ part, selected, children, others }: Family): Reach {
	const box = boxOf(part);
	if (selected)
		return { boxes: [{ ...box, counts: true }], offset: 0n, most: box.high, open: part.share.highOpen, fixed: false };
	if (children.length === 0)
		return { boxes: [{ ...box, counts: false }], offset: 0n, most: 0n, open: false, fixed: false };
	const highs = sum(children.map(({ share }) => share.high));
	const start = least(highs, (box.low - others) as PartShare);
	const end = least(highs, (box.high - others) as PartShare);
	const useful = end - start;
	return {
		boxes: [
			{ low: box.low, high: (box.low + useful) as PartShare, counts: true },
			{ low: 0n as PartShare, high: (box.high - box.low - useful) as PartShare, counts: false }
		],
		offset: start - box.low,
		most: end,
		open:
			(end === highs && children.some(({ share }) => share.highOpen)) ||
			(end === box.high - others && part.share.highOpen),
		fixed: useful === 0n
	};
}
