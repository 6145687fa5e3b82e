import { describe, expect, test } from 'vitest';
import {
	APPROVED_COPY,
	DRAFT_COPY,
	LIST_NAMES,
	PRODUCT_FILE,
	longFile
} from '../../../../templates/pdf/testing/nightfold';
import { PRINTED_SECTIONS, type LabelCopyData, type ProductFileData } from '../../../../templates/pdf/types';
import { en } from '../../../../templates/phrases/en';
import { print } from './print';
import { asOneLine, pagesOf } from './testing';

const creationDate = '2026-12-01T14:20:00Z';
const copyPages = async (data: LabelCopyData) => pagesOf(await print({ kind: 'label-copy', data, creationDate }));
const fileBytes = (data: ProductFileData) => print({ kind: 'product-file', data, creationDate });
const MARK = en.copy.marks.draft;

const LONG_END = 'The very last words.';
const long = (length: number) => `${'Smooth over clean skin. '.repeat(length / 24)}${LONG_END}`;

describe('Label copy', () => {
	test('the list is read in its order', async () => {
		expect(asOneLine((await copyPages(APPROVED_COPY)).join(' '))).toContain(`Ingredients: ${LIST_NAMES.join(', ')}`);
	});

	test('colourants that may be present follow in brackets', async () => {
		const data = { ...APPROVED_COPY, list: { ...APPROVED_COPY.list, mayContain: ['CI 77491', 'CI 77891'] } };
		expect(asOneLine((await copyPages(data)).join(' '))).toContain('Linalyl Acetate [May contain: CI 77491, CI 77891]');
	});

	test('an approved copy carries no mark', async () => {
		expect((await copyPages(APPROVED_COPY)).join(' ')).not.toMatch(/not for print/i);
	});

	test('the mark stands at head and foot of every page of a long draft', async () => {
		const pages = await copyPages({
			...DRAFT_COPY,
			open: Array.from({ length: 120 }, (_, at) => `Open point ${at + 1}.`)
		});
		expect(pages.length).toBeGreaterThan(2);
		for (const page of pages) expect(page.split(MARK).length - 1).toBe(2);
	});

	test('a copy in use that went out of date is marked and says why', async () => {
		const text = (
			await copyPages({ ...APPROVED_COPY, state: 'inUse', inUseFrom: '26-131', outOfDate: 'Formula 8 drops Squalane.' })
		).join(' ');
		expect(text).toContain(en.copy.marks.outOfDate);
		expect(text).toContain('Formula 8 drops Squalane.');
		expect(text).toContain('in use, out of date');
	});

	test('no word of a very long text is lost at a page’s end', async () => {
		const elements = DRAFT_COPY.elements.map((row) =>
			row.element === 'directions' ? { ...row, text: long(9600) } : row
		);
		const approvals = [
			{ role: 'client', decision: 'sentBack', name: 'Tobias Fenn', date: '1 Dec 2026', comment: long(6000) } as const
		];
		const text = asOneLine((await copyPages({ ...DRAFT_COPY, elements, approvals, open: [long(4800)] })).join(' '));
		expect(text.split(LONG_END).length - 1).toBe(3);
	});
});

describe('Product file', () => {
	test('the same data gives the same bytes', async () => {
		expect(Buffer.compare(await fileBytes(PRODUCT_FILE), await fileBytes(structuredClone(PRODUCT_FILE)))).toBe(0);
	});

	test('every section of the law is printed with its article, also one that nobody has begun', async () => {
		const text = asOneLine(
			(await pagesOf(await fileBytes({ ...PRODUCT_FILE, sections: [], copies: [], evidence: [] }))).join(' ')
		);
		for (const section of PRINTED_SECTIONS) {
			expect(text).toContain(en.sections[section].title);
			expect(text).toContain(en.sections[section].law);
		}
		expect(text.split(en.file.readiness.notBegun).length - 1).toBe(PRINTED_SECTIONS.length);
	});

	test('it holds the list, full hashes, what is missing in words and the cautions', async () => {
		const text = asOneLine((await pagesOf(await fileBytes(PRODUCT_FILE))).join(' '));
		expect(text).toContain(`Ingredients: ${LIST_NAMES.join(', ')}`);
		for (const document of PRODUCT_FILE.evidence) expect(text.replaceAll(' ', '')).toContain(document.sha256);
		expect(text).toContain('Part B has not been signed for formula 7.');
		expect(text).toContain('Not sealed: sections 2, 3 and 6 are not ready.');
		expect(text).toContain(en.shared.caution);
	});

	test('a draft copy bound in the file keeps its mark on its pages, and only there', async () => {
		const pages = (await pagesOf(await fileBytes(PRODUCT_FILE))).filter((page) => page.includes(MARK));
		expect(pages.every((page) => page.includes('Label copy, Nightfold Cream') || page.includes('Contents'))).toBe(true);
		expect(pages.length).toBeGreaterThanOrEqual(2);
	});

	test('the contents name the page on which each section begins', async () => {
		const file = await fileBytes(longFile(160));
		const pages = await pagesOf(file);
		const [, contents = ''] = await pagesOf(file, true);
		const listed = contents.split('\n').flatMap((line) => {
			const found = /^\s*(?:\d+\s+)?(\d+\s+)?(\S.*?)(?:\s{2,}.*)?\s+(\d+)$/.exec(line);
			return found?.[2] && found[3] ? [{ line: asOneLine(line), page: Number(found[3]) }] : [];
		});
		for (const section of PRINTED_SECTIONS) {
			const { title } = en.sections[section];
			const entry = listed.find((candidate) => candidate.line.includes(title));
			expect(entry, title).toBeDefined();
			const heading = new RegExp(`^\\d+ +${title.replace(/[()]/g, '\\$&')}$`, 'm');
			const first = pages.findIndex((page, index) => index > 1 && heading.test(page));
			expect(entry?.page, title).toBe(first + 1);
		}
	});

	test('the cover counts the pages', async () => {
		const pages = await pagesOf(await fileBytes(PRODUCT_FILE));
		expect(asOneLine(pages[0] ?? '')).toContain(`English, pages: ${pages.length}`);
	});

	test('a sealed issue fills the box and has no column for what is open', async () => {
		const issue = {
			kind: 'sealed',
			number: 4,
			date: '4 Dec 2026',
			sealedBy: 'Ines Marlow',
			manifestHash: 'ab'.repeat(32)
		} as const;
		const text = asOneLine((await pagesOf(await fileBytes({ ...PRODUCT_FILE, issue }))).join(' '));
		expect(text).not.toContain(en.file.contentsOpen);
		expect(text.replaceAll(' ', '')).toContain('ab'.repeat(32));
	});

	test('no word of a very long answer or remark is lost', async () => {
		const [claim] = PRODUCT_FILE.claims;
		const [first, ...rest] = PRODUCT_FILE.sections;
		if (!claim || !first) throw new Error('The sample has a claim and a section');
		const text = asOneLine(
			(
				await pagesOf(
					await fileBytes({
						...PRODUCT_FILE,
						claims: [{ ...claim, answers: { ...claim.answers, honesty: long(7200) } }],
						sections: [
							{
								...first,
								needs: [{ item: 'Name', law: 'Art. 11(2)(a)', answer: 'missing', words: long(4800) }],
								blocks: [
									{
										kind: 'table',
										title: 'Long',
										columns: [
											{ head: 'a', kind: 'text', weight: 1 },
											{ head: 'b', kind: 'text', weight: 4 }
										],
										rows: [['short', long(4800)]]
									}
								]
							},
							...rest
						]
					})
				)
			).join(' ')
		);
		expect(text.split(LONG_END).length - 1).toBe(3);
	});
});
