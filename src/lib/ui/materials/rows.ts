import { resolveMaterial } from '$lib/domain/material/resolve';
import type { Constituent, MaterialFault, MaterialVersion } from '$lib/domain/material/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS, type Id, type PartShare } from '$lib/domain/quantity/units';
import { readFigure, type ROW_ROLES, type USES } from '$lib/schemas/material';

/** A row of the sheet as it is typed. */
export interface DraftRow {
	readonly key: number;
	inci: string;
	cas: string;
	ec: string;
	min: string;
	typical: string;
	max: string;
	role: (typeof ROW_ROLES)[number];
	/** Key of the row that this one is part of. */
	parent: number | null;
	use: (typeof USES)[number];
	nano: boolean;
	documentId: string;
	page: string;
}

const idOf = (key: number) => String(key) as Id<'constituent'>;

interface Figures {
	readonly low: PartShare | null;
	readonly typical: PartShare | null;
	readonly high: PartShare | null;
	readonly highOpen: boolean;
}

/** Null when a figure cannot be read yet; then nothing is computed from the row. */
function figuresOf(row: DraftRow): Figures | null {
	const [min, typical, max] = [readFigure(row.min), readFigure(row.typical), readFigure(row.max)];
	if (min.kind === 'fault' || typical.kind === 'fault' || max.kind === 'fault') return null;
	const value = (figure: typeof min) => (figure.kind === 'value' ? (figure.value as PartShare) : null);
	const boundOnly = typical.kind === 'value' && typical.open && max.kind === 'none';
	return {
		low: value(min),
		typical: boundOnly ? null : value(typical),
		high: boundOnly ? value(typical) : value(max),
		highOpen: boundOnly || (max.kind === 'value' && max.open)
	};
}

export interface Narrowed {
	readonly low: string;
	readonly typical: string;
	readonly high: string;
	readonly basis: 'declared' | 'normalised' | 'derived';
}
export interface RowFault {
	readonly fault: MaterialFault;
	readonly by: string | null;
	/** Key of the row it names, if any. */
	readonly at: number | null;
}
export interface Judged {
	readonly faults: readonly RowFault[];
	readonly narrowed: ReadonlyMap<number, Narrowed>;
	/** Whether every figure could be read. */
	readonly readable: boolean;
}

/** Reads the sheet as the core does: what the sum narrows, or by how much it contradicts itself. */
export function judgeRows(rows: readonly DraftRow[]): Judged {
	const constituents: Constituent[] = [];
	for (const row of rows) {
		const declared = figuresOf(row);
		if (!declared) return { faults: [], narrowed: new Map(), readable: false };
		const common = {
			id: idOf(row.key),
			substance: row.inci as Id<'substance'>,
			declared,
			nano: row.nano,
			use: row.use,
			source: null
		};
		constituents.push(
			row.role === 'ofWhich'
				? { ...common, place: 'ofWhich', parent: idOf(row.parent ?? -1) }
				: { ...common, place: 'inSum', role: row.role }
		);
	}
	return judgeConstituents(constituents, Number);
}

/** The same for a stored version; `keyOf` turns a constituent's id into the key of its row. */
export function judgeConstituents<K extends number>(
	constituents: readonly Constituent[],
	keyOf: (id: string) => K
): Judged {
	const version: MaterialVersion = {
		id: 'sheet' as Id<'materialVersion'>,
		material: 'sheet' as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		contentHash: null,
		constituents
	};
	const outcome = resolveMaterial(version);
	const text = (value: bigint) => formatExact(value, PART_DECIMALS);
	if (!outcome.ok) {
		const faults = outcome.faults.map((fault) => ({
			fault,
			by: 'by' in fault ? text(fault.by) : null,
			at: 'at' in fault ? keyOf(fault.at) : 'parent' in fault ? keyOf(fault.parent) : null
		}));
		return { faults, narrowed: new Map(), readable: true };
	}
	const narrowed = new Map(
		outcome.value.parts.map(({ of, share }) => [
			keyOf(of.id) as number,
			{ low: text(share.low), typical: text(share.typical), high: text(share.high), basis: share.basis }
		])
	);
	return { faults: [], narrowed, readable: true };
}

/** What the supplier declared, in words: "48 to 52", "below 0.1", "99.5", "balance". */
export function declaredWords(
	row: Pick<DraftRow, 'min' | 'typical' | 'max'>,
	words: {
		readonly between: (low: string, high: string) => string;
		readonly below: (high: string) => string;
		readonly balance: string;
	}
): string {
	const open = row.max.startsWith('<') || row.typical.startsWith('<');
	const high = (row.max || (open ? row.typical : '')).replace(/^<\s*/, '');
	if (!row.min && open) return words.below(high);
	if (row.min && row.max) return words.between(row.min, high);
	if (row.max) return words.between(row.min || '0', high);
	if (row.typical) return row.typical;
	return row.min ? words.between(row.min, '100') : words.balance;
}
