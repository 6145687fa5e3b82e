import { describe, expect, test } from 'vitest';
import { inspectPdf, pdfInMemory } from './inspect-pdf';

/** A PDF of empty pages, written by hand with its cross-reference table. */
function pdf(pages: number, trailerMore = ''): Uint8Array {
	const kids = Array.from({ length: pages }, (_, index) => `${index + 3} 0 R`).join(' ');
	const objects = [
		'<</Type/Catalog/Pages 2 0 R>>',
		`<</Type/Pages/Count ${pages}/Kids[${kids}]>>`,
		...Array.from({ length: pages }, () => '<</Type/Page/Parent 2 0 R/MediaBox[0 0 9 9]>>')
	];
	let text = '%PDF-1.4\n';
	const offsets = objects.map((object, index) => {
		const at = text.length;
		text += `${index + 1} 0 obj${object}endobj\n`;
		return `${String(at).padStart(10, '0')} 00000 n \n`;
	});
	const size = objects.length + 1;
	const table = `xref\n0 ${size}\n0000000000 65535 f \n${offsets.join('')}`;
	return Buffer.from(
		`${text}${table}trailer<</Size ${size}/Root 1 0 R${trailerMore}>>\nstartxref\n${text.length}\n%%EOF\n`
	);
}

// Encrypted with a password to open (40 bits, revision 2): the hashes stand for one that nobody here knows.
const LOCKED = `/ID[<00><00>]/Encrypt<</Filter/Standard/V 1/R 2/P -4/O<${'11'.repeat(32)}>/U<${'22'.repeat(32)}>>>`;

describe('inspectPdf', () => {
	test.each([1, 12])('counts %i pages', async (pages) => {
		expect(await inspectPdf(pdfInMemory(pdf(pages)))).toEqual({ pages, encrypted: false, broken: false });
	});

	test('a document that needs a password is encrypted, not broken', async () => {
		expect(await inspectPdf(pdfInMemory(pdf(2, LOCKED)))).toEqual({ pages: null, encrypted: true, broken: false });
	});

	test.each([
		['nonsense', Buffer.from('%PDF-1.7\nnothing of the kind\n')],
		['a document cut in the middle', pdf(3).subarray(0, 60)]
	])('%s is broken', async (_what, content) => {
		expect(await inspectPdf(pdfInMemory(content))).toEqual({ pages: null, encrypted: false, broken: true });
	});

	test('a large document is read in pieces, not whole', async () => {
		const padding = 8 * 1024 * 1024;
		const small = pdf(4).toString();
		const cut = small.indexOf('xref');
		const begin = Buffer.from(`${small.slice(0, cut)}9 0 obj<</Length ${padding}>>stream\n`);
		const end = '\nendstream endobj\n';
		const tail = small.slice(cut).replace(/startxref\n\d+/, `startxref\n${begin.length + padding + end.length}`);
		const content = Buffer.concat([begin, Buffer.alloc(padding, 'a'), Buffer.from(end + tail)]);
		let read = 0;
		const facts = await inspectPdf({
			bytes: content.length,
			read: async (start, end) => {
				read += end - start;
				return new Uint8Array(content.subarray(start, end));
			}
		});
		expect(facts).toEqual({ pages: 4, encrypted: false, broken: false });
		expect(read).toBeLessThan(padding / 4);
	});

	test('a document built to be slow is given up', async () => {
		const small = pdf(1).toString();
		const content = Buffer.from(small.replace('xref\n0', `${' '.repeat(4 * 1024 * 1024)}xref\n0`));
		const facts = await inspectPdf(pdfInMemory(content), 1);
		expect(facts).toEqual({ pages: null, encrypted: false, broken: true });
	});

	test('a fault of reading is thrown, not blamed on the document', async () => {
		const source = { bytes: 1000, read: () => Promise.reject(new Error('the line is cut')) };
		await expect(inspectPdf(source)).rejects.toThrow('the line is cut');
	});
});
