import { Readable } from 'node:stream';
import { strToU8, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import writeXlsxFile from 'write-excel-file/node';
import { formatOf, plainFigure } from './figures';
import { readSheet, UnreadableSheet, type SheetRow } from './index';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
const csv = (bytes: string | Buffer) => readSheet(Readable.from([Buffer.from(bytes)]), 'text/csv');
const xlsx = (bytes: Uint8Array) => readSheet(Readable.from([Buffer.from(bytes)]), XLSX);
const texts = (rows: readonly SheetRow[]) => rows.map((row) => [...row.cells].map((cell) => cell?.text ?? ''));
const problemOf = async (reading: Promise<unknown>) => {
	const error = await reading.then(
		() => null,
		(thrown: unknown) => thrown
	);
	return error instanceof UnreadableSheet ? error.problem : error;
};

/** A workbook of one sheet, from the XML of its rows. */
const workbook = (rows: string, after = '', more: Record<string, Uint8Array> = {}) =>
	zipSync({
		'xl/workbook.xml': strToU8(
			'<workbook xmlns:r="r"><sheets><sheet name="H" state="hidden" r:id="r0"/><sheet name="A" r:id="r1"/></sheets></workbook>'
		),
		'xl/_rels/workbook.xml.rels': strToU8(
			'<Relationships><Relationship Id="r0" Target="worksheets/sheet0.xml"/><Relationship Id="r1" Target="worksheets/sheet1.xml"/></Relationships>'
		),
		'xl/styles.xml': strToU8(
			'<styleSheet><numFmts><numFmt numFmtId="170" formatCode="0.0000%"/></numFmts><cellXfs><xf numFmtId="0"/><xf numFmtId="10"/><xf numFmtId="170"/><xf numFmtId="14"/></cellXfs></styleSheet>'
		),
		'xl/sharedStrings.xml': strToU8(
			'<sst><si><t>Glycerin</t></si><si><r><t>Citric </t></r><r><t>Acid</t></r><rPh><t>kana</t></rPh></si></sst>'
		),
		'xl/worksheets/sheet1.xml': strToU8(`<worksheet><sheetData>${rows}</sheetData>${after}</worksheet>`),
		...more
	});

describe('a figure of a workbook', () => {
	test.each([
		['4.9999999999999996E-2', 0, '0.05'],
		['0.1', 0, '0.1'],
		['0.30000000000000004', 0, '0.3'],
		['1E-3', 0, '0.001'],
		['12.5', 0, '12.5'],
		['100', 0, '100'],
		['1.0000000000000001E-5', 0, '0.00001'],
		['0.05', 2, '5'],
		['0.00012345', 2, '0.012345'],
		['1', 2, '100'],
		['-0.5', 0, '-0.5'],
		['0', 2, '0']
	])('%s with %i places moved reads %s', (stored, places, shown) => expect(plainFigure(stored, places)).toBe(shown));
	test.each([
		[9, undefined, 'percent'],
		[170, '0.00%', 'percent'],
		[170, '0.0" % of it"', 'plain'],
		[14, undefined, 'date'],
		[170, 'dd/mm/yyyy', 'date'],
		[170, '[Red]0.00', 'plain'],
		[0, 'General', 'plain']
	] as const)('format %i %s is %s', (id, code, format) => expect(formatOf(id, code)).toBe(format));
});

describe('a delimited text', () => {
	test.each([
		[
			'a;b\n1,5;2',
			[
				['a', 'b'],
				['1,5', '2']
			]
		],
		[
			'a,b\n"1,5",2',
			[
				['a', 'b'],
				['1,5', '2']
			]
		],
		[
			'a\tb\n1.5\t2',
			[
				['a', 'b'],
				['1.5', '2']
			]
		],
		[
			'\ufeffa;b\r\n\r\n;\r\n"x ""y""";"two\nlines"',
			[
				['a', 'b'],
				['x "y"', 'two\nlines']
			]
		]
	])('%j', async (text, rows) => expect(texts(await csv(text))).toEqual(rows));
	test('keeps the number that the program shows beside a row', async () => {
		expect((await csv('a;b\n\n1;2')).map(({ number }) => number)).toEqual([1, 3]);
	});
	test('reads UTF-16 and the eight-bit set', async () => {
		expect(texts(await csv(Buffer.from('\ufeffÄ;b\n1;2', 'utf16le')))[0]).toEqual(['Ä', 'b']);
		expect(texts(await csv(Buffer.from([0xc4, 0x3b, 0x62, 0x0a, 0x31, 0x3b, 0x32])))[0]).toEqual(['Ä', 'b']);
	});
	test('refuses nothing at all and more than the limit', async () => {
		expect(await problemOf(csv('\n \n'))).toEqual({ kind: 'empty' });
		expect(await problemOf(csv('a;b\n'.repeat(20_002)))).toEqual({ kind: 'tooManyRows', limit: 20_000 });
	});
});

describe('a workbook', () => {
	test('as a spreadsheet program writes it', async () => {
		const bytes = await writeXlsxFile([
			[{ value: 'constituent' }, { value: 'max' }],
			[{ value: 'Glycerin' }, { value: 0.995, type: Number, format: '0.00%' }]
		]).toBuffer();
		expect(texts(await xlsx(bytes))).toEqual([
			['constituent', 'max'],
			['Glycerin', '99.5']
		]);
	});
	test('shared and inline texts, shares, computed formulas; the hidden sheet is left aside', async () => {
		const rows = `<row r="2"><c r="A2" t="s"><v>0</v></c><c r="B2" t="s"><v>1</v></c><c r="C2" t="inlineStr"><is><t>Aqua</t></is></c>
			<c r="D2" s="1"><v>0.05</v></c><c r="E2" s="2"><v>1.2345E-4</v></c><c r="F2"><f>A1+1</f><v>4.9999999999999996E-2</v></c>
			<c r="G2" t="str"><f>"x"</f><v>x &amp; y</v></c></row>`;
		const read = await xlsx(workbook(rows));
		expect(read[0]?.number).toBe(2);
		expect(texts(read)).toEqual([['Glycerin', 'Citric Acid', 'Aqua', '5', '0.012345', '0.05', 'x & y']]);
	});
	test('says which cells cannot be trusted', async () => {
		const rows =
			'<row r="1"><c r="A1" t="e"><v>#REF!</v></c><c r="B1"><f>C1</f></c><c r="C1" s="3"><v>45000</v></c><c r="D1"><v>1</v></c></row>';
		const [row] = await xlsx(workbook(rows));
		expect(row?.cells.map((cell) => cell?.fault)).toEqual(['errorValue', 'notComputed', 'becameDate', null]);
	});
	test('a merged range gives its content to each of its cells', async () => {
		const rows =
			'<row r="1"><c r="A1" t="s"><v>0</v></c><c r="B1"><v>1</v></c></row><row r="2"><c r="B2"><v>2</v></c></row>';
		const read = await xlsx(workbook(rows, '<mergeCells><mergeCell ref="A1:A2"/></mergeCells>'));
		expect(texts(read)).toEqual([
			['Glycerin', '1'],
			['Glycerin', '2']
		]);
	});
	test('a small file that unpacks to gigabytes is stopped', async () => {
		const bomb = zipSync({ 'a.xml': new Uint8Array(1) });
		expect(await problemOf(xlsx(bomb))).toEqual({ kind: 'notASheet' });
		const huge = new Uint8Array(110 * 1024 * 1024).fill(0x20);
		const packed = workbook('<row r="1"><c r="A1"><v>1</v></c></row>', '', { 'xl/styles.xml': huge });
		expect(packed.length).toBeLessThan(1024 * 1024);
		expect(await problemOf(xlsx(packed))).toMatchObject({ kind: 'unpacksTooLarge' });
	}, 30_000);
	test.each([
		['no archive', Buffer.from('hello'), 'notASheet'],
		['a password or the old kind', Buffer.from('d0cf11e0a1b11ae10000', 'hex'), 'encrypted'],
		['broken markup', Buffer.from(workbook('<row><c></row>')), 'notASheet'],
		['no row', Buffer.from(workbook('')), 'empty']
	])('%s', async (_why, bytes, kind) => expect(await problemOf(xlsx(bytes))).toMatchObject({ kind }));
	test('entities of its own are not expanded', async () => {
		const rows = '<row r="1"><c r="A1" t="str"><v>&lol;</v></c></row>';
		expect(await problemOf(xlsx(workbook(rows)))).toMatchObject({ kind: 'notASheet' });
	});
});
