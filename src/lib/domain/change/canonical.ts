/**
 * One text for one content: keys sorted, integers as strings, nothing optional. Hashes of statements and of the audit rest on it,
 * so its form may never change; golden texts in the tests hold it.
 */
export function canonicalText(value: unknown): string {
	if (value === null || value === undefined) return 'null';
	if (typeof value === 'bigint') return JSON.stringify(value.toString());
	if (typeof value !== 'object') return JSON.stringify(value);
	if (Array.isArray(value)) return `[${value.map(canonicalText).join(',')}]`;
	const entries = Object.entries(value)
		.filter(([, content]) => content !== undefined)
		.sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
		.map(([key, content]) => `${JSON.stringify(key)}:${canonicalText(content)}`);
	return `{${entries.join(',')}}`;
}
