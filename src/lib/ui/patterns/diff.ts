export interface DiffPart {
	readonly kind: 'same' | 'added' | 'removed';
	readonly text: string;
}

/** Words, spaces and the commas that end a name; a comma inside a name, as in 1,2-Hexanediol, belongs to it. */
const pieces = (text: string): string[] => text.match(/,(?=\s|$)\s*|\s+|(?:[^\s,]|,(?!\s|$))+/g) ?? [];

/** Length of the longest common run of pieces from each pair of places to the end. */
function common(from: readonly string[], to: readonly string[]): number[][] {
	const table = Array.from({ length: from.length + 1 }, () => new Array<number>(to.length + 1).fill(0));
	for (let i = from.length - 1; i >= 0; i--) {
		for (let j = to.length - 1; j >= 0; j--) {
			const row = table[i]!;
			row[j] = from[i] === to[j] ? table[i + 1]![j + 1]! + 1 : Math.max(table[i + 1]![j]!, row[j + 1]!);
		}
	}
	return table;
}

function push(parts: DiffPart[], kind: DiffPart['kind'], text: string): void {
	const last = parts.at(-1);
	if (last?.kind === kind) parts[parts.length - 1] = { kind, text: last.text + text };
	else parts.push({ kind, text });
}

/** What became of a text: `same` and `removed` together give the old one, `same` and `added` the new one. */
export function diffTexts(before: string, after: string): DiffPart[] {
	const from = pieces(before);
	const to = pieces(after);
	const table = common(from, to);
	const parts: DiffPart[] = [];
	let i = 0;
	let j = 0;
	while (i < from.length || j < to.length) {
		if (i < from.length && j < to.length && from[i] === to[j]) {
			push(parts, 'same', from[i]!);
			i++;
			j++;
		} else if (i < from.length && (j >= to.length || table[i + 1]![j]! >= table[i]![j + 1]!)) {
			push(parts, 'removed', from[i++]!);
		} else {
			push(parts, 'added', to[j++]!);
		}
	}
	return parts;
}
