import { describe, expect, test } from 'vitest';
import {
	cleanFileName,
	judgeAnnounced,
	kindNotTaken,
	NAME_LIMIT,
	PART_BYTES,
	partBytes,
	partCount,
	UPLOAD_LIMIT_BYTES
} from './upload-rules';

const MIB = 1024 * 1024;

describe('what is announced', () => {
	test('exactly 250 MiB may begin', () => expect(judgeAnnounced('a.pdf', 250 * MIB)).toBeNull());

	test('one byte more is refused, naming file, size and limit', () => {
		expect(judgeAnnounced('a.pdf', 250 * MIB + 1)).toEqual({
			code: 'file-too-large',
			data: { name: 'a.pdf', bytes: 262_144_001, limit: UPLOAD_LIMIT_BYTES }
		});
	});

	test.each([0, -1])('a file of %i bytes is refused as empty', (bytes) => {
		expect(judgeAnnounced('a.pdf', bytes)).toEqual({ code: 'file-empty', data: { name: 'a.pdf', bytes: 0 } });
	});

	test('a kind we do not keep is named beside those we do', () => {
		const { code, data } = kindNotTaken('a.pdf', 'application/x-msdownload');
		expect(code).toBe('kind-not-taken');
		expect(data).toMatchObject({ name: 'a.pdf', found: 'application/x-msdownload' });
	});
});

describe('parts', () => {
	test.each([
		[1, 1, 1],
		[PART_BYTES, 1, PART_BYTES],
		[PART_BYTES + 1, 2, 1],
		[250 * MIB, 32, 2 * MIB]
	])('%i bytes are %i parts, the last of %i', (bytes, count, last) => {
		expect(partCount(bytes)).toBe(count);
		expect(partBytes(bytes, count)).toBe(last);
		const sizes = Array.from({ length: count }, (_, index) => partBytes(bytes, index + 1) ?? 0);
		expect(sizes.reduce((sum, size) => sum + size, 0)).toBe(bytes);
	});

	test.each([0, 3, 1.5, NaN])('a file of two parts has no part %d', (number) => {
		expect(partBytes(PART_BYTES + 1, number)).toBeNull();
	});
});

describe('names', () => {
	test.each([
		['Prüfbericht β 12.pdf', 'Prüfbericht β 12.pdf'],
		['C:\\reports\\a.pdf', 'a.pdf'],
		['../../etc/passwd', 'passwd'],
		['a\u202Efdp.exe', 'afdp.exe'],
		['a\r\nset-cookie: b.pdf', 'aset-cookie_ b.pdf'],
		['  .hidden. ', 'hidden'],
		['..', 'file'],
		['', 'file'],
		['a"b<c>.pdf', 'a_b_c_.pdf']
	])('%j is kept as %j', (given, kept) => expect(cleanFileName(given)).toBe(kept));

	test('a long name keeps its ending and stays whole characters', () => {
		const kept = cleanFileName(`${'🌿'.repeat(200)}.pdf`);
		expect(kept.length).toBeLessThanOrEqual(NAME_LIMIT);
		expect(kept).toMatch(/🌿\.pdf$/u);
		expect(() => encodeURIComponent(kept)).not.toThrow();
	});
});
