/** RFC 4180. A cell that a spreadsheet would run as a formula is made text. */
const cell = (value: string | number | null) => {
	const text = value === null ? '' : String(value);
	const safe = /^[=+\-@\t\r]/.test(text) && !/^-?\d/.test(text) ? `'${text}` : text;
	return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
};

export function csvResponse(
	fileName: string,
	head: readonly string[],
	rows: readonly (readonly (string | number | null)[])[]
): Response {
	const text = [head, ...rows].map((row) => row.map(cell).join(',')).join('\r\n');
	return new Response(`${text}\r\n`, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${fileName}"`
		}
	});
}
