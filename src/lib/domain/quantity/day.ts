import type { IsoDate } from './units';

const SHAPE = /^(\d{4})-(\d{2})-(\d{2})$/;
const LENGTHS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

/** A calendar day from its ISO text, or null when there is no such day. */
export function isoDate(text: string): IsoDate | null {
	const match = SHAPE.exec(text);
	if (!match) return null;
	const [year, month, day] = match.slice(1).map((part) => BigInt(part)) as [bigint, bigint, bigint];
	const leap = (year % 4n === 0n && year % 100n !== 0n) || year % 400n === 0n;
	const length = LENGTHS[Number(month) - 1];
	if (length === undefined || day < 1n || day > BigInt(month === 2n && leap ? 29 : length)) return null;
	return text as IsoDate;
}

export const isBefore = (a: IsoDate, b: IsoDate) => a < b;
