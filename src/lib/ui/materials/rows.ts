import { resolveMaterial } from '$lib/domain/material/resolve';
import { roomOf } from '$lib/domain/material/room';
import type { Constituent, MaterialFault, MaterialVersion } from '$lib/domain/material/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS, WHOLE_PART, type Id } from '$lib/domain/quantity/units';
import { declaredOf, type ORIGINS, type ROW_ROLES, type USES } from '$lib/schemas/material';

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
	origin: (typeof ORIGINS)[number] | null;
	documentId: string;
	page: string;
}

const idOf = (key: number) => String(key) as Id<'constituent'>;

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

/** The rows as the core reads constituents; null while a figure cannot be read. */
function constituentsOf(rows: readonly DraftRow[]): readonly Constituent[] | null {
	const constituents: Constituent[] = [];
	for (const row of rows) {
		const declared = declaredOf(row);
		if (!declared) return null;
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
	return constituents;
}

/** Reads the sheet as the core does: what the sum narrows, or by how much it contradicts itself. */
export function judgeRows(rows: readonly DraftRow[]): Judged {
	const constituents = constituentsOf(rows);
	return constituents ? judgeConstituents(constituents, Number) : { faults: [], narrowed: new Map(), readable: false };
}

export interface Ends {
	readonly low: string;
	readonly high: string;
}

/** What the others leave each row; null where they alone exceed 100. Empty while a figure cannot be read. */
export function roomOfRows(rows: readonly DraftRow[]): ReadonlyMap<number, Ends | null> {
	const text = (value: bigint) => formatExact(value, PART_DECIMALS);
	return new Map(
		[...roomOf(constituentsOf(rows) ?? [])].map(([id, room]) => [
			Number(id),
			room && { low: text(room.low), high: text(room.high) }
		])
	);
}

/** The ends of what the supplier declared, for drawing; null when a figure cannot be read. */
export function declaredEnds(row: DraftRow): Ends | null {
	const declared = declaredOf(row);
	if (!declared) return null;
	const { low, typical, high } = declared;
	const single = low === null && high === null ? typical : null;
	const text = (value: bigint) => formatExact(value, PART_DECIMALS);
	return { low: text(single ?? low ?? 0n), high: text(single ?? high ?? WHOLE_PART) };
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

/** A constituent as the server sends it. */
export interface StoredConstituent {
	readonly id: string;
	readonly inci: string;
	readonly cas: string | null;
	readonly ec: string | null;
	readonly low: string | null;
	readonly typical: string | null;
	readonly high: string | null;
	readonly high_open: boolean;
	readonly place: 'inSum' | 'ofWhich';
	readonly role: Exclude<DraftRow['role'], 'ofWhich'> | null;
	readonly parent_id: string | null;
	readonly use: DraftRow['use'];
	readonly nano: boolean;
	readonly origin: DraftRow['origin'];
	readonly source_document_id: string | null;
	readonly source_page: number | null;
}

/** Trailing zeros of the database's scale are nobody's typing. */
const plain = (decimal: string | null) => (decimal === null ? '' : decimal.replace(/\.?0+$/, ''));

/** Stored constituents as rows of the sheet; their keys count from 1. */
export const rowsOf = (constituents: readonly StoredConstituent[]): DraftRow[] =>
	constituents.map((row, index) => ({
		key: index + 1,
		inci: row.inci,
		cas: row.cas ?? '',
		ec: row.ec ?? '',
		min: plain(row.low),
		typical: plain(row.typical),
		max: row.high_open ? `< ${plain(row.high)}` : plain(row.high),
		role: row.place === 'ofWhich' ? 'ofWhich' : (row.role ?? 'ingredient'),
		parent: row.parent_id === null ? null : constituents.findIndex(({ id }) => id === row.parent_id) + 1,
		use: row.use,
		nano: row.nano,
		origin: row.origin,
		documentId: row.source_document_id ?? '',
		page: row.source_page === null ? '' : String(row.source_page)
	}));
