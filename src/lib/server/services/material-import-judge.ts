import { resolveMaterial } from '$lib/domain/material/resolve';
import { substanceKey } from '$lib/domain/material/substance-key';
import type { Constituent, MaterialFault } from '$lib/domain/material/types';
import { formatExact } from '$lib/domain/quantity/decimal';
import { PART_DECIMALS, type Id } from '$lib/domain/quantity/units';
import { constituentRowSchema, declaredOf, MOST_ROWS, type ConstituentRowInput } from '$lib/schemas/material';
import {
	columnNamed,
	FUNCTION_WORDS,
	isMaterialCode,
	ORIGIN_WORDS,
	REQUIRED_COLUMNS,
	ROLE_WORDS,
	YES_WORDS,
	type ImportCells,
	type ImportColumn,
	type ImportFault
} from '$lib/schemas/material-import';
import type { SheetRow } from '../sheets';

export interface ImportRow {
	readonly number: number;
	readonly cells: ImportCells;
	/** What the sheet's own cells are faulty of; kept until the cell is mended. */
	readonly unread: readonly ImportFault[];
}

export type HeadProblem =
	| { readonly kind: 'columnsMissing'; readonly columns: readonly ImportColumn[] }
	| {
			readonly kind: 'columnTwice';
			readonly columns: readonly string[];
	  };
export type ReadHead =
	| { readonly ok: true; readonly rows: readonly ImportRow[]; readonly ignored: readonly string[] }
	| { readonly ok: false; readonly problem: HeadProblem };

/** Takes the first row as the head and gives every other cell its column's name. */
export function rowsOfSheet([head, ...rows]: readonly SheetRow[]): ReadHead {
	const names = [...(head?.cells ?? [])].map((cell) => cell?.text ?? '');
	const columns = names.map(columnNamed);
	const twice = columns.filter((column, at) => column !== null && columns.indexOf(column) !== at);
	if (twice.length > 0) {
		return { ok: false, problem: { kind: 'columnTwice', columns: twice.flatMap((column) => column ?? []) } };
	}
	const missing = REQUIRED_COLUMNS.filter((column) => !columns.includes(column));
	if (missing.length > 0) return { ok: false, problem: { kind: 'columnsMissing', columns: missing } };
	const ignored = names.filter((name, at) => name !== '' && columns[at] === null);
	return { ok: true, ignored, rows: fillCodes(rows.map((row) => importRow(row, columns))) };
}

function importRow({ number, cells }: SheetRow, columns: readonly (ImportColumn | null)[]): ImportRow {
	const named: Partial<Record<ImportColumn, string>> = {};
	const unread: ImportFault[] = [];
	columns.forEach((column, at) => {
		const cell = cells[at];
		if (column === null || !cell) return;
		named[column] = cell.text;
		if (cell.fault) unread.push({ field: column, why: cell.fault, value: cell.text, limit: null });
	});
	return { number, cells: named, unread };
}

/** A row without a code goes on with the material of the row above it. */
function fillCodes(rows: readonly ImportRow[]): readonly ImportRow[] {
	let code = '';
	return rows.map((row) => {
		const own = (row.cells.material_code ?? '').trim().toUpperCase();
		if (own !== '') code = own;
		return { ...row, cells: { ...row.cells, material_code: own || code } };
	});
}

/** What is there already, as far as the rows name it. */
export interface Known {
	readonly materials: ReadonlyMap<string, KnownMaterial>;
	/** Documents by title in small letters; several may bear one. */
	readonly documents: ReadonlyMap<string, readonly string[]>;
	/** Cited where a row names no document of its own: the sheet itself. */
	readonly sheet: string;
}
export interface KnownMaterial {
	readonly id: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly draft: number | null;
	readonly newest: number;
	/** What the newest version says, as `saidBy` writes it; null when it has no rows. */
	readonly said: string | null;
}

export type Outcome = 'faulty' | 'newMaterial' | 'newVersion' | 'unchanged';
export interface JudgedMaterial {
	readonly code: string;
	readonly tradeName: string;
	readonly supplier: string;
	readonly outcome: Outcome;
	readonly rows: readonly ConstituentRowInput[];
	readonly faults: ReadonlyMap<number, readonly ImportFault[]>;
}

/** Rows of one material, in their order. */
export function groupRows(rows: readonly ImportRow[]): ReadonlyMap<string, readonly ImportRow[]> {
	const groups = new Map<string, ImportRow[]>();
	for (const row of rows) {
		const code = row.cells.material_code ?? '';
		const group = groups.get(code);
		if (group) group.push(row);
		else groups.set(code, [row]);
	}
	return groups;
}

/** Judges the rows of one material: each cell, then what the rows say together. */
export function judgeMaterial(code: string, rows: readonly ImportRow[], known: Known): JudgedMaterial {
	const faults = new Map<number, ImportFault[]>(rows.map((row) => [row.number, [...row.unread]]));
	const say = (number: number, fault: ImportFault) => faults.get(number)?.push(fault);
	const first = rows[0];
	const here = known.materials.get(code) ?? null;
	const names = { tradeName: firstOf(rows, 'trade_name'), supplier: firstOf(rows, 'supplier') };
	if (first) {
		for (const fault of headFaults(code, first.cells, names, here, rows.length)) say(first.number, fault);
	}
	for (const row of rows) for (const fault of differing(row.cells, names)) say(row.number, fault);
	const read = rows.map((row) => readRow(row, rows, known));
	read.forEach(({ faults: own }, at) => own.forEach((fault) => say(rows[at]?.number ?? 0, fault)));
	const inputs = read.flatMap(({ input }) => input ?? []);
	const clean = [...faults.values()].every((own) => own.length === 0);
	if (clean && first) {
		for (const { at, fault } of contradictions(inputs)) say(rows[at]?.number ?? first.number, fault);
	}
	const faulty = [...faults.values()].some((own) => own.length > 0);
	return {
		code,
		tradeName: here?.tradeName ?? names.tradeName,
		supplier: here?.supplier ?? names.supplier,
		outcome: faulty ? 'faulty' : outcomeOf(here, inputs),
		rows: inputs,
		faults
	};
}

function outcomeOf(here: KnownMaterial | null, inputs: readonly ConstituentRowInput[]): Outcome {
	if (!here) return 'newMaterial';
	return here.said === saidBy(inputs.map(saidByInput)) ? 'unchanged' : 'newVersion';
}

const firstOf = (rows: readonly ImportRow[], column: ImportColumn): string =>
	rows.map((row) => row.cells[column] ?? '').find((text) => text !== '') ?? '';

const NAME_LIMIT = 200;
const fault = (field: ImportFault['field'], why: string, value = '', limit: string | null = null): ImportFault => ({
	field,
	why,
	value,
	limit
});

/** What must be known of the material itself; said at its first row. */
function headFaults(
	code: string,
	cells: ImportCells,
	names: { readonly tradeName: string; readonly supplier: string },
	here: KnownMaterial | null,
	rows: number
): readonly ImportFault[] {
	const faults: ImportFault[] = [];
	if (!isMaterialCode(code)) faults.push(fault('material_code', code ? 'codeShape' : 'codeMissing', code));
	if (rows > MOST_ROWS) faults.push(fault('material', 'tooManyConstituents', String(rows), String(MOST_ROWS)));
	if (here?.draft != null) faults.push(fault('material_code', 'draftOpen', code, String(here.draft)));
	for (const [field, said, known] of [
		['trade_name', names.tradeName, here?.tradeName],
		['supplier', names.supplier, here?.supplier]
	] as const) {
		if (known === undefined && said === '') faults.push(fault(field, 'missing'));
		else if (said.length > NAME_LIMIT) faults.push(fault(field, 'tooLongName', said, String(NAME_LIMIT)));
		else if (known !== undefined && said !== '' && said !== known) {
			faults.push(fault(field, 'differsFromKnown', cells[field] ?? said, known));
		}
	}
	return faults;
}

/** One material has one trade name and one supplier. */
const differing = (
	cells: ImportCells,
	names: { readonly tradeName: string; readonly supplier: string }
): readonly ImportFault[] =>
	(
		[
			['trade_name', names.tradeName],
			['supplier', names.supplier]
		] as const
	).flatMap(([field, expected]) => {
		const value = cells[field] ?? '';
		return value !== '' && value !== expected ? [fault(field, 'differsFromFirst', value, expected)] : [];
	});

interface ReadRow {
	readonly input: ConstituentRowInput | null;
	readonly faults: readonly ImportFault[];
}

/** Which column of the sheet a field of the grid's row comes from. */
const COLUMN_OF: Readonly<Record<string, ImportColumn>> = {
	inci: 'constituent',
	cas: 'cas',
	ec: 'ec',
	min: 'min',
	typical: 'typical',
	max: 'max',
	page: 'page'
};

function readRow(row: ImportRow, group: readonly ImportRow[], known: Known): ReadRow {
	const { cells } = row;
	const faults: ImportFault[] = [];
	const word = <T>(field: ImportColumn, words: Readonly<Record<string, T>>, otherwise: T): T => {
		const text = (cells[field] ?? '').trim().toLowerCase();
		if (text === '') return otherwise;
		if (Object.hasOwn(words, text)) return words[text] ?? otherwise;
		faults.push(fault(field, 'wordUnknown', cells[field], Object.keys(words).join(', ')));
		return otherwise;
	};
	const parentName = (cells.part_of ?? '').trim();
	const role = word('role', ROLE_WORDS, parentName === '' ? 'ingredient' : 'ofWhich');
	const parent = parentOf(parentName, role, group);
	if (parent.fault) faults.push(parent.fault);
	const document = documentOf(cells.document ?? '', known);
	if (document.fault) faults.push(document.fault);
	const page = pageOf(cells.page ?? '');
	if (page.fault) faults.push(page.fault);
	const candidate = {
		inci: cells.constituent ?? '',
		cas: cells.cas ?? '',
		ec: cells.ec ?? '',
		min: figureText(cells.min),
		typical: figureText(cells.typical),
		max: figureText(cells.max),
		role,
		parent: parent.at,
		use: word('function', FUNCTION_WORDS, 'other'),
		nano: word('nano', YES_WORDS, false),
		origin: word('origin', ORIGIN_WORDS, null),
		documentId: document.id,
		page: page.number
	};
	const parsed = constituentRowSchema.safeParse(candidate);
	if (!parsed.success) {
		for (const issue of parsed.error.issues) {
			const field = COLUMN_OF[String(issue.path[0])] ?? 'constituent';
			const limit = issue.code === 'custom' ? (issue.params?.['limit'] as string | null | undefined) : null;
			const why = issue.code === 'custom' ? issue.message : cells[field] ? 'tooLongName' : 'missing';
			faults.push(fault(field, why, cells[field] ?? '', limit ?? null));
		}
	}
	return { input: parsed.success && faults.length === 0 ? parsed.data : null, faults };
}

/** Suppliers write "5 %" as often as "5". */
const figureText = (text: string | undefined) => (text ?? '').replace(/\s*%$/, '');

function parentOf(
	name: string,
	role: ConstituentRowInput['role'],
	group: readonly ImportRow[]
): { readonly at: number | null; readonly fault: ImportFault | null } {
	if (role !== 'ofWhich') {
		return { at: null, fault: name === '' ? null : fault('part_of', 'partWithoutRole', name) };
	}
	if (name === '') return { at: null, fault: fault('part_of', 'parentMissing') };
	const at = group.findIndex(
		({ cells }) =>
			substanceKey(cells.constituent ?? '') === substanceKey(name) &&
			(cells.part_of ?? '') === '' &&
			(cells.role ?? '').trim().toLowerCase() !== 'of which'
	);
	return at < 0 ? { at: null, fault: fault('part_of', 'parentUnknown', name) } : { at, fault: null };
}

function documentOf(title: string, known: Known): { readonly id: string; readonly fault: ImportFault | null } {
	if (title === '') return { id: known.sheet, fault: null };
	const found = known.documents.get(title.toLowerCase()) ?? [];
	const [id] = found;
	if (id === undefined) return { id: known.sheet, fault: fault('document', 'documentUnknown', title) };
	if (found.length > 1) return { id, fault: fault('document', 'documentTwice', title, String(found.length)) };
	return { id, fault: null };
}

const LAST_PAGE = 100_000;

function pageOf(text: string): { readonly number: number | null; readonly fault: ImportFault | null } {
	if (text === '') return { number: null, fault: null };
	const number = /^\d{1,6}$/.test(text) ? Number(text) : 0;
	return number >= 1 && number <= LAST_PAGE
		? { number, fault: null }
		: { number: null, fault: fault('page', 'noPage', text, String(LAST_PAGE)) };
}

const NOTHING_SAID = { low: null, typical: null, high: null, highOpen: false } as const;

/** What the rows together contradict, at the row that it names or at the first. */
function contradictions(rows: readonly ConstituentRowInput[]): { readonly at: number; readonly fault: ImportFault }[] {
	const constituents = rows.map((row, at): Constituent => {
		const common = {
			id: String(at) as Id<'constituent'>,
			substance: substanceKey(row.inci) as Id<'substance'>,
			declared: declaredOf(row) ?? NOTHING_SAID,
			nano: row.nano,
			use: row.use,
			source: null
		};
		return row.role === 'ofWhich'
			? { ...common, place: 'ofWhich', parent: String(row.parent) as Id<'constituent'> }
			: { ...common, place: 'inSum', role: row.role };
	});
	const outcome = resolveMaterial({
		id: 'sheet' as Id<'materialVersion'>,
		material: 'sheet' as Id<'material'>,
		number: 1,
		effectiveFrom: null,
		contentHash: null,
		constituents
	});
	if (outcome.ok) return [];
	return outcome.faults.map((each) => ({
		at: placeOf(each),
		fault: fault('material', each.kind, '', 'by' in each ? formatExact(each.by, PART_DECIMALS) : null)
	}));
}

const placeOf = (each: MaterialFault): number =>
	'at' in each ? Number(each.at) : 'parent' in each ? Number(each.parent) : 0;

/** One constituent as it is compared: figures without trailing zeros, names by their key. */
export interface SaidRow {
	readonly substance: string;
	readonly role: string;
	readonly parent: string | null;
	readonly use: string;
	readonly nano: boolean;
	readonly origin: string | null;
	readonly low: string | null;
	readonly typical: string | null;
	readonly high: string | null;
	readonly highOpen: boolean;
	readonly cas: string | null;
	readonly ec: string | null;
}

/** Two versions that say the same have the same text. The document is left aside: the same figures again move nothing. */
export const saidBy = (rows: readonly SaidRow[]): string => JSON.stringify(rows.map((row) => Object.values(row)));

function saidByInput(row: ConstituentRowInput, _at: number, all: readonly ConstituentRowInput[]): SaidRow {
	const { low, typical, high, highOpen } = declaredOf(row) ?? NOTHING_SAID;
	const text = (value: bigint | null) => (value === null ? null : formatExact(value, PART_DECIMALS));
	const parent = row.parent === null ? undefined : all[row.parent];
	return {
		substance: substanceKey(row.inci),
		role: row.role,
		parent: parent ? substanceKey(parent.inci) : null,
		use: row.use,
		nano: row.nano,
		origin: row.origin,
		low: text(low),
		typical: text(typical),
		high: text(high),
		highOpen,
		cas: row.cas || null,
		ec: row.ec || null
	};
}
