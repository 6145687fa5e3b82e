import type { EditedLine, LineView, MaterialView } from '$lib/schemas/grid-view';
import { mergeLines, type LineConflict, type PastedRow } from '$lib/ui/formula/compute';
import { postJson, type JsonRefusal } from '$lib/ui/formula/post';

type Saved = 'clean' | 'saving' | 'saved' | 'lost';
const copyOf = (lines: readonly LineView[]): EditedLine[] => lines.map((line) => ({ ...line }));

/** One draft in the hands of one person: its lines, what was saved, and what stands in the way. */
export class Editor {
	lines = $state<EditedLine[]>([]);
	materials = $state.raw<readonly MaterialView[]>([]);
	faults = $state.raw<Readonly<Record<number, readonly [string, string, string | null]>>>({});
	refusal = $state.raw<JsonRefusal | null>(null);
	conflicts = $state.raw<readonly LineConflict[]>([]);
	saved = $state<Saved>('clean');
	restored = $state(false);
	rev: number;
	#base = $state.raw<readonly LineView[]>([]);
	#history: EditedLine[][] = [];
	readonly #key: string;

	constructor(versionId: string, rev: number, lines: readonly LineView[], materials: readonly MaterialView[]) {
		this.#key = `costmary:formula:${versionId}`;
		this.rev = rev;
		this.#base = copyOf(lines);
		this.lines = copyOf(lines);
		this.materials = materials;
	}

	get dirty(): boolean {
		return JSON.stringify(this.lines) !== JSON.stringify(this.#base);
	}

	/** The browser's own storage outlives a reload and a lost connection. */
	restore(): void {
		const kept = localStorage.getItem(this.#key);
		if (!kept) return;
		const copy = JSON.parse(kept) as { lines: EditedLine[]; materials: MaterialView[] };
		if (JSON.stringify(copy.lines) === JSON.stringify(this.#base)) return;
		this.lines = copy.lines;
		this.#know(copy.materials);
		this.restored = true;
	}

	keep(): void {
		if (this.dirty) localStorage.setItem(this.#key, JSON.stringify({ lines: this.lines, materials: this.materials }));
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

	add(material: MaterialView, percent = ''): void {
		this.remember();
		this.#know([material]);
		const phase = this.lines.at(-1)?.phase ?? 'A';
		const { code, name } = material;
		this.lines.push({ id: crypto.randomUUID(), phase, kind: 'material', code, name, percent, qs: false });
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
		const response = await fetch(`/formulas/materials.json?q=${encodeURIComponent(row.name)}`);
		const [first] = response.ok ? ((await response.json()) as MaterialView[]) : [];
		if (!first) return false;
		this.add(first, row.percent);
		return true;
	}

	#know(materials: readonly MaterialView[]): void {
		const fresh = materials.filter(({ code }) => !this.materials.some((known) => known.code === code));
		this.materials = [...this.materials, ...fresh];
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
