import type { Id } from '../quantity/units';
import type { Composition, CompositionRow, WeighedMaterial } from './types';

/** Which materials hold a row or a substance: read once, asked for every name of every market's list. */
export interface Touching {
	readonly byRow: ReadonlyMap<string, readonly WeighedMaterial[]>;
	readonly bySubstance: ReadonlyMap<Id<'substance'>, readonly WeighedMaterial[]>;
	readonly rows: ReadonlyMap<string, CompositionRow>;
	readonly rowsOf: ReadonlyMap<Id<'substance'>, readonly CompositionRow[]>;
}

const KNOWN = new WeakMap<Composition, Touching>();

export function touching(composition: Composition): Touching {
	const known = KNOWN.get(composition);
	if (known) return known;
	const byRow = new Map<string, Set<WeighedMaterial>>();
	const bySubstance = new Map<Id<'substance'>, Set<WeighedMaterial>>();
	for (const material of composition.weighed)
		for (const { rowKey, substance } of material.parts) {
			put(byRow, rowKey, material);
			put(bySubstance, substance, material);
		}
	const rowsOf = new Map<Id<'substance'>, Set<CompositionRow>>();
	for (const row of composition.rows) put(rowsOf, row.substance, row);
	const made: Touching = {
		byRow: listed(byRow),
		bySubstance: listed(bySubstance),
		rows: new Map(composition.rows.map((row) => [row.key, row])),
		rowsOf: listed(rowsOf)
	};
	KNOWN.set(composition, made);
	return made;
}

function put<K, V>(map: Map<K, Set<V>>, key: K, value: V): void {
	const known = map.get(key);
	if (known) known.add(value);
	else map.set(key, new Set([value]));
}

const listed = <K, V>(map: ReadonlyMap<K, ReadonlySet<V>>): ReadonlyMap<K, readonly V[]> =>
	new Map([...map].map(([key, values]) => [key, [...values]]));
