import { paths } from '$lib/ui/paths';
import type { BulkTree, BulkView, EditedLine, LineView, MaterialView, Suggestion } from '$lib/schemas/grid-view';
import { mergeLines, type LineConflict, type PastedRow } from '$lib/ui/formula/compute';
import { postJson, type JsonRefusal } from '$lib/ui/post-json';

type Saved = 'clean' | 'saving' | 'saved' | 'lost' | 'signedOut' | 'unsettled';
const copyOf = (lines: readonly LineView[]): EditedLine[] => lines.map((line) => ({ ...line }));

interface Kept extends BulkTree {
	readonly lines: readonly EditedLine[];
	readonly rev?: number;
	readonly base?: readonly LineView[];
}

const PLAIN = { percent: '', min: '', max: '', qs: false, pinned: null, pinReason: '' } as const;

const isSame = (a: string, b: string) => a.toLowerCase() === b.toLowerCase();

const knownBy = (suggestion: Suggestion): Promise<BulkTree | null> | BulkTree =>
	suggestion.kind === 'material' ? { materials: [suggestion.material], bulks: [] } : bulkAt(suggestion.code, null);

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
	/** Somebody else's saved lines were joined with these. */
	joined = $state(false);
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

	/** The browser's own storage outlives a reload and a lost connection; what others saved meanwhile meets it as a conflict. */
	restore(): void {
		const kept = localStorage.getItem(this.#key);
		if (!kept) return;
		const copy = JSON.parse(kept) as Kept;
		const lines = copy.lines.map((line) => ({ ...PLAIN, ...line }));
		if (JSON.stringify(lines) === JSON.stringify(this.#base)) return;
		this.#know({ materials: copy.materials, bulks: copy.bulks ?? [] });
		this.restored = true;
		if (copy.rev === undefined || copy.rev === this.rev) this.lines = lines;
		else this.#meet(copy.base ?? [], lines, this.#base);
	}

	keep(): void {
		const { lines, materials, bulks, rev } = this;
		const kept: Kept = { lines, materials, bulks, rev, base: this.#base };
		if (this.dirty) localStorage.setItem(this.#key, JSON.stringify(kept));
		else localStorage.removeItem(this.#key);
	}

	/** Takes what was saved elsewhere since, as by going on from a trial; what is typed and not saved meets it. */
	receive(rev: number, lines: readonly LineView[], known: BulkTree): void {
		this.#know(known);
		if (this.dirty) this.#meet(this.#base, $state.snapshot(this.lines), lines);
		else this.lines = copyOf(lines);
		this.#base = copyOf(lines);
		this.rev = rev;
	}

	/** Joins what is typed here with what somebody else saved; lines that both changed wait for a choice. */
	#meet(base: readonly LineView[], mine: readonly LineView[], theirs: readonly LineView[]): void {
		const { lines, conflicts } = mergeLines(base, mine, theirs);
		this.lines = copyOf(lines);
		this.conflicts = conflicts;
		this.joined = true;
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
	async add(suggestion: Suggestion): Promise<boolean> {
		const known = await knownBy(suggestion);
		if (!known) return false;
		this.remember();
		this.#put(suggestion, known, '', false);
		return true;
	}

	#put(suggestion: Suggestion, known: BulkTree, percent: string, qs: boolean): void {
		this.#know(known);
		const phase = this.lines.at(-1)?.phase ?? 'A';
		const { code, name } = suggestion.kind === 'material' ? suggestion.material : suggestion;
		if (qs) for (const line of this.lines) line.qs = false;
		this.lines.push({ ...PLAIN, id: crypto.randomUUID(), phase, kind: suggestion.kind, code, name, percent, qs });
	}

	/** Pins a bulk to one of its versions, or lets it follow the newest again. */
	async pin(line: LineView, pinned: number | null): Promise<void> {
		const known = await bulkAt(line.code, pinned);
		const own = this.lines.find(({ id }) => id === line.id);
		if (!known || !own) return;
		this.remember();
		this.#know(known);
		Object.assign(own, { pinned, pinReason: pinned === null ? '' : own.pinReason });
	}

	remove(line: LineView): void {
		this.remember();
		this.lines = this.lines.filter((each) => each.id !== line.id);
	}

	/**
	 * Fills amounts from a line on; a row goes to the line that it names exactly, by code or name, or becomes one. Everything is
	 * looked up before anything is changed. Answers with the names that nothing has. @throws when the connection is gone.
	 */
	async paste(from: number, rows: readonly PastedRow[]): Promise<readonly string[]> {
		const fresh: { readonly row: PastedRow; readonly suggestion: Suggestion; readonly known: BulkTree }[] = [];
		for (const row of rows) {
			if (row.names.length === 0 || this.#lineNamed(row.names)) continue;
			const suggestion = await this.#exactly(row.names);
			const known = suggestion && (await knownBy(suggestion));
			if (suggestion && known) fresh.push({ row, suggestion, known });
		}
		this.remember();
		const missing: string[] = [];
		for (const [offset, row] of rows.entries()) {
			const line = row.names.length === 0 ? this.lines[from + offset] : this.#lineNamed(row.names);
			const found = fresh.find((each) => each.row === row);
			if (line) this.#fill(line, row);
			else if (found) this.#put(found.suggestion, found.known, row.percent, row.qs);
			else missing.push(row.names.join(' '));
		}
		return missing;
	}

	/** An empty cell leaves the amount as it is; what cannot be read stands in the line, marked, as if it had been typed. */
	#fill(line: EditedLine, { percent, qs }: PastedRow): void {
		if (qs) for (const each of this.lines) each.qs = each.id === line.id;
		else if (percent !== '') Object.assign(line, { percent, qs: false });
	}

	#lineNamed(names: readonly string[]): EditedLine | undefined {
		return this.lines.find(({ code, name }) => names.some((each) => isSame(each, code) || isSame(each, name)));
	}

	async #exactly(names: readonly string[]): Promise<Suggestion | null> {
		for (const name of names) {
			const response = await fetch(paths.formulaLines(name, this.code));
			const found = response.ok ? ((await response.json()) as Suggestion[]) : [];
			const exact = found.filter((suggestion) => {
				const { code, name: own } = suggestion.kind === 'material' ? suggestion.material : suggestion;
				return isSame(name, code) || isSame(name, own);
			});
			if (exact.length === 1) return exact[0] ?? null;
		}
		return null;
	}

	#know({ materials, bulks }: BulkTree): void {
		const fresh = materials.filter(({ code }) => !this.materials.some((known) => known.code === code));
		this.materials = [...this.materials, ...fresh];
		this.bulks = [
			...this.bulks,
			...bulks.filter(({ code, pinned }) => !this.bulks.some((known) => known.code === code && known.pinned === pinned))
		];
	}

	async save(): Promise<void> {
		if (this.conflicts.length > 0) {
			this.saved = 'unsettled';
			return;
		}
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
				this.joined = false;
				this.keep();
			} else if (answer.type === 'failure' && answer.data) this.#refused(answer.data.refused);
			else this.saved = answer.type === 'redirect' ? 'signedOut' : 'lost';
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
			this.remember();
			this.#meet(this.#base, $state.snapshot(this.lines), theirs);
			this.#base = theirs;
			this.rev = refusal.data['rev'] as number;
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
