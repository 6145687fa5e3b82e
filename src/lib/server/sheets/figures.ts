/** What a spreadsheet shows of a binary figure: 15 significant digits. */
const DIGITS = 15;

/** A figure as the workbook stores it ("4.9999999999999996E-2"), as the decimal that a person typed ("0.05"). */
export function plainFigure(stored: string, timesTenTo = 0): string {
	const value = Number(stored);
	if (!Number.isFinite(value)) return stored;
	const [mantissa = '0', exponent = '0'] = value.toExponential(DIGITS - 1).split('e');
	return shifted(mantissa, Number(exponent) + timesTenTo);
}

/** mantissa × 10^places without any binary arithmetic. */
function shifted(mantissa: string, places: number): string {
	const negative = mantissa.startsWith('-');
	const [whole = '0', fraction = ''] = mantissa.replace('-', '').split('.');
	const digits = whole + fraction;
	const point = whole.length + places;
	const padded = point <= 0 ? '0'.repeat(1 - point) + digits : digits.padEnd(point, '0');
	const at = Math.max(point, 1);
	const text = `${padded.slice(0, at)}.${padded.slice(at)}`.replace(/\.?0+$/, '').replace(/^0+(?=\d)/, '');
	return (negative && text !== '0' ? '-' : '') + (text || '0');
}

/** Built-in number formats that show a share, and those that show a day or a time (ECMA-376 Part 1, 18.8.30). */
const PERCENT_FORMATS = new Set([9, 10]);
const isDateFormat = (id: number) => (id >= 14 && id <= 22) || (id >= 45 && id <= 47);

export type FigureFormat = 'plain' | 'percent' | 'date';

/** How a number format shows a figure. Quoted text, brackets and escaped characters of the code say nothing of it. */
export function formatOf(id: number, code: string | undefined): FigureFormat {
	if (PERCENT_FORMATS.has(id)) return 'percent';
	if (isDateFormat(id)) return 'date';
	const bare = (code ?? '').replace(/"[^"]*"|\[[^\]]*\]|\\.|_./g, '').split(';')[0] ?? '';
	if (bare.includes('%')) return 'percent';
	return /[ymdhs]/i.test(bare) && !/general/i.test(bare) ? 'date' : 'plain';
}
