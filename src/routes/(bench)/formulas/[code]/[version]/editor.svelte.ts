import { paths } from '$lib/ui/paths';
import type { BulkTree, BulkView, EditedLine, LineView, MaterialView, Suggestion } from '$lib/schemas/grid-view';
import { mergeLines, type LineConflict, type PastedRow } from '$lib/ui/formula/compute';
import { postJson, type JsonRefusal } from '$lib/ui/formula/post';

type Saved = 'clean' | 'saving' | 'saved' | 'lost';
const copyOf = (lines: readonly LineView[]): EditedLine[] => lines.map((line) => ({ ...line }));

const PLAIN = { percent: '', min: '', max: '', qs: false, pinned: null, pinReason: '' } as const;

async function bulkAt(code: string, version: number | null): Promise<BulkTree | null> {
	const response = await fetch(paths.bulk(code, version));
	return response.ok ? ((await response.json()) as BulkTree) : null;
}

/** One draft in the hands of one person: its lines, what was saved, and what stands in the way. */
export class Editor {
	lines = $state<EditedLine[]>([]);
	materials = $state.raw<readonly MaterialView[]>([]);
	bulks = $state.raw<readonly BulkView[]>([]);
	faults = $state.raw<Readonly<Record<number, readonly [string, string, string | null]>>>({});
	refusal = $state.raw<JsonRefusal | null>(null);
	conflicts = $state.raw<readonly LineConflict[]>([]);
	saved = $state<Saved>('clean');
	restored = $state(false);
	rev: number;
	#base = $state.raw<readonly LineView[]>([]);
	#history: EditedLine[][] = [];
	readonly #key: string;

	constructor(
		private readonly code: string,
		version: { readonly id: string; readonly rev: number },
		lines: readonly LineView[],
		known: BulkTree
	) {
		this.#key = `costmary:formula:${version.id}`;
		this.rev = version.rev;
		this.#base = copyOf(lines);
		this.lines = copyOf(lines);
		this.#know(known);
	}

	get dirty(): boolean {
		return JSON.stringify(this.lines) !== JSON.stringify(this.#base);
	}

	/** The browser's own storage outlives a reload and a lost connection. */
	restore(): void {
		const kept = localStorage.getItem(this.#key);
		if (!kept) return;
		const copy = JSON.parse(kept) as { lines: EditedLine[] } & BulkTree;
		if (JSON.stringify(copy.lines) === JSON.stringify(this.#base)) return;
		this.lines = copy.lines.map((line) => ({ ...PLAIN, ...line }));
		this.#know({ materials: copy.materials, bulks: copy.bulks ?? [] });
		this.restored = true;
	}

	keep(): void {
		const { lines, materials, bulks } = this;
		if (this.dirty) localStorage.setItem(this.#key, JSON.stringify({ lines, materials, bulks }));
		else localStorage.removeItem(this.#key);
	}

	/** Before a change, so that it can be undone. */
	remember(): void {
		this.#history.push($state.snapshot(this.lines));
	}

	undo(): void {
		const last = this.#history.pop();
		if (last) this.lines = last;
	}

	/** False when the bulk cannot be read. */
	async add(suggestion: Suggestion, percent = ''): Promise<boolean> {
		const { kind } = suggestion;
		const known =
			kind === 'material' ? { materials: [suggestion.material], bulks: [] } : await bulkAt(suggestion.code, null);
		if (!known) return false;
		this.remember();
		this.#know(known);
		const phase = this.lines.at(-1)?.phase ?? 'A';
		const { code, name } = kind === 'material' ? suggestion.material : suggestion;
		this.lines.push({ ...PLAIN, id: crypto.randomUUID(), phase, kind, code, name, percent });
		return true;
	}

	/** Pins a bulk to one of its versions, or lets it follow the newest again. */
	async pin(line: LineView, pinned: number | null): Promise<void> {
		const known = await bulkAt(line.code, pinned);
		const own = this.lines.find(({ id }) => id === line.id);
		if (!known || !own) return;
		this.remember();
		this.bulks = this.bulks.filter(({ code }) => !known.bulks.some((bulk) => bulk.code === code));
		this.#know(known);
		Object.assign(own, { pinned, pinReason: pinned === null ? '' : own.pinReason });
	}

	remove(line: LineView): void {
		this.remember();
		this.lines = this.lines.filter((each) => each.id !== line.id);
	}

	/** Fills amounts from a line on; rows that name a material go to its line, or become one. Answers with names not found. */
	async paste(from: number, rows: readonly PastedRow[]): Promise<readonly string[]> {
		this.remember();
		const missing: string[] = [];
		for (const [offset, row] of rows.entries()) {
			if (!row.name) {
				const line = this.lines[from + offset];
				if (line && !line.qs) line.percent = row.percent;
				continue;
			}
			const line = this.lines.find(({ code, name }) =>
				[code, name].some((each) => each.toLowerCase() === row.name.toLowerCase())
			);
			if (line) Object.assign(line, { percent: row.percent, qs: false });
			else if (!(await this.#addByName(row))) missing.push(row.name);
		}
		return missing;
	}

	async #addByName(row: PastedRow): Promise<boolean> {
		const response = await fetch(paths.formulaLines(row.name, this.code));
		const [first] = response.ok ? ((await response.json()) as Suggestion[]) : [];
		return first ? this.add(first, row.percent) : false;
	}

	#know({ materials, bulks }: BulkTree): void {
		const fresh = materials.filter(({ code }) => !this.materials.some((known) => known.code === code));
		this.materials = [...this.materials, ...fresh];
		this.bulks = [...this.bulks, ...bulks.filter(({ code }) => !this.bulks.some((known) => known.code === code))];
	}

	async save(): Promise<void> {
		this.saved = 'saving';
		this.faults = {};
		this.refusal = null;
		const sent = $state.snapshot(this.lines);
		try {
			const lines = sent.map(({ name: _name, ...line }) => line);
			const answer = await postJson<number>('save', { rev: this.rev, lines });
			if (answer.type === 'success' && answer.data) {
				this.rev = answer.data.result;
				this.#base = sent;
				this.saved = 'saved';
				this.restored = false;
				this.keep();
			} else if (answer.type === 'failure' && answer.data) this.#refused(answer.data.refused);
			else this.saved = 'lost';
		} catch {
			this.saved = 'lost';
		}
	}

	/** True when the version is released. */
	async release(): Promise<boolean> {
		this.refusal = null;
		try {
			const answer = await postJson<unknown>('release', { rev: this.rev });
			if (answer.type === 'failure' && answer.data) this.#refused(answer.data.refused);
			return answer.type === 'success';
		} catch {
			this.saved = 'lost';
			return false;
		}
	}

	#refused(refusal: JsonRefusal): void {
		this.saved = 'clean';
		if (refusal.code === 'conflict') {
			const theirs = (refusal.data['theirs'] ?? []) as LineView[];
			const { lines, conflicts } = mergeLines(this.#base, $state.snapshot(this.lines), theirs);
			this.remember();
			this.lines = copyOf(lines);
			this.#base = theirs;
			this.rev = refusal.data['rev'] as number;
			this.conflicts = conflicts;
		}
		const faults = [...refusal.faults, ...((refusal.data['faults'] ?? []) as JsonRefusal['faults'])];
		this.faults = Object.fromEntries(
			faults.flatMap(({ path, why, value, limit }) => {
				const [head, row] = path?.split('.') ?? [];
				return head === 'lines' && row !== undefined ? [[Number(row), [why, value, limit]]] : [];
			})
		);
		this.refusal = refusal;
	}

	settle(conflict: LineConflict, choice: 'mine' | 'theirs'): void {
		const chosen = conflict[choice];
		const without = this.lines.filter((line) => line.id !== conflict.id);
		const at = this.lines.findIndex((line) => line.id === conflict.id);
		this.lines = chosen
			? [...without.slice(0, at < 0 ? undefined : at), { ...chosen }, ...(at < 0 ? [] : without.slice(at))]
			: without;
		this.conflicts = this.conflicts.filter((each) => each.id !== conflict.id);
	}
}
