/** How values read on the page. Nothing here rounds a percentage or asks for the day's date. */

export type DecimalSign = '.' | ',';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;
const ISO_DAY = /^(\d{4})-(\d{2})-(\d{2})/;
const ISO_TIME = /^\d{4}-\d{2}-\d{2}[T ](\d{2}:\d{2})/;
const DECIMAL = /^([+-]?)(\d+)(?:\.(\d+))?$/;

/**
 * "1 Dec 2026" from the first ten characters of an ISO date or time. The text is read, never turned into a moment,
 * so that no time zone can move the day. What is not a date is given back as it came.
 */
export function formatDate(iso: string): string {
	const [, year, month, day] = ISO_DAY.exec(iso) ?? [];
	const name = MONTHS[Number(month) - 1];
	return name ? `${Number(day)} ${name} ${year}` : iso;
}

/** "1 Dec 2026, 14:02" as written in the text (the server writes UTC). */
export function formatDateTime(iso: string): string {
	const [, time] = ISO_TIME.exec(iso) ?? [];
	return time ? `${formatDate(iso)}, ${time}` : formatDate(iso);
}

function grouped(digits: string, sign: DecimalSign): string {
	return digits.replace(/\B(?=(\d{3})+$)/g, sign === '.' ? ',' : '.');
}

/** An exact decimal with the person's decimal sign; digits are kept as they are. `group` sets off thousands. */
export function formatDecimal(value: string, sign: DecimalSign, group = false): string {
	const [, minus, whole, fraction] = DECIMAL.exec(value) ?? [];
	if (whole === undefined) return value;
	const front = `${minus === '-' ? '−' : minus}${group ? grouped(whole, sign) : whole}`;
	return fraction === undefined ? front : `${front}${sign}${fraction}`;
}

/** "4.350–4.850"; one figure where both ends are the same text. */
export function formatRange(low: string, high: string, sign: DecimalSign): string {
	return low === high ? formatDecimal(low, sign) : `${formatDecimal(low, sign)}–${formatDecimal(high, sign)}`;
}

/** A whole number with its thousands set off: 1,204 or 1.204. */
export function formatCount(value: number | bigint, sign: DecimalSign): string {
	return formatDecimal(String(value), sign, true);
}

const UNITS = ['bytes', 'KiB', 'MiB', 'GiB'] as const;

/** A file's size with one decimal from KiB upwards, rounded up so that a size over a limit never reads as within. */
export function formatSize(bytes: number, sign: DecimalSign): string {
	let unit = 0;
	let tenths = bytes * 10;
	while (tenths >= 10_240 && unit < UNITS.length - 1) {
		tenths /= 1024;
		unit += 1;
	}
	if (unit === 0) return `${formatCount(bytes, sign)} ${bytes === 1 ? 'byte' : 'bytes'}`;
	const cut = Math.ceil(tenths);
	const fraction = cut % 10;
	return `${Math.floor(cut / 10)}${fraction ? `${sign}${fraction}` : ''} ${UNITS[unit]}`;
}

/** plural(1, 'name', 'names') is "1 name". The sentence keeps its number. */
export function plural(count: number, one: string, many: string, sign: DecimalSign = '.'): string {
	return `${formatCount(count, sign)} ${count === 1 ? one : many}`;
}

export interface Format {
	readonly sign: DecimalSign;
	date(iso: string): string;
	dateTime(iso: string): string;
	decimal(value: string, group?: boolean): string;
	range(low: string, high: string): string;
	count(value: number | bigint): string;
	size(bytes: number): string;
}

/** The person's way of writing, to be handed down by context. */
export const formatFor = (sign: DecimalSign): Format => ({
	sign,
	date: formatDate,
	dateTime: formatDateTime,
	decimal: (value, group) => formatDecimal(value, sign, group),
	range: (low, high) => formatRange(low, high, sign),
	count: (value) => formatCount(value, sign),
	size: (bytes) => formatSize(bytes, sign)
});
