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

// Opens without a password but forbids printing: one empty page, encrypted by qpdf with an owner's password only.
const RESTRICTED = [
	'JVBERi0xLjcKJb/3ov4KMSAwIG9iago8PCAvRXh0ZW5zaW9ucyA8PCAvQURCRSA8PCAvQmFzZVZlcnNpb24gLzEuNyAvRXh0ZW5zaW9uTGV2ZW',
	'wgOCA+PiA+PiAvUGFnZXMgMiAwIFIgL1R5cGUgL0NhdGFsb2cgPj4KZW5kb2JqCjIgMCBvYmoKPDwgL0NvdW50IDEgL0tpZHMgWyAzIDAgUiBd',
	'IC9UeXBlIC9QYWdlcyA+PgplbmRvYmoKMyAwIG9iago8PCAvTWVkaWFCb3ggWyAwIDAgOSA5IF0gL1BhcmVudCAyIDAgUiAvVHlwZSAvUGFnZS',
	'A+PgplbmRvYmoKNCAwIG9iago8PCAvQ0YgPDwgL1N0ZENGIDw8IC9BdXRoRXZlbnQgL0RvY09wZW4gL0NGTSAvQUVTVjMgL0xlbmd0aCAzMiA+',
	'PiA+PiAvRmlsdGVyIC9TdGFuZGFyZCAvTGVuZ3RoIDI1NiAvTyA8Y2E3OTBlOWVjODNhOWExM2I2ZTI5MjdiZDc2OGY4NWQzZjA2ZTIwNzZmOT',
	'c2YWEzZTM4OTIyNzEyMTE2ODg0Yzc4MDgxNDRmYTZiZDgwYzc5Mzc1YzYxZDFlNzg4Y2FhPiAvT0UgPGU3MTNkNzgwNzI4YTdhMGEwZjkyMWE1',
	'ZmFkYzBjZTFlMTcwODI4MzNlNDcxNGFhNTQ4YTJhZmE0NDYyMjg2ZTE+IC9QIC0yMDU2IC9QZXJtcyA8NzBhNTM4ZDc2NThhMzAwMzM1ZGY2Yz',
	'lkOTc2YTdhZjc+IC9SIDYgL1N0bUYgL1N0ZENGIC9TdHJGIC9TdGRDRiAvVSA8YjNlM2RlNTNiZjk4MzQ1OGViZTQ4ZTY5N2EwOGU1NWUxMDVj',
	'MGVjY2U2NWJjNWFlNDY1MDhlZWYzOWQwMGIwZWM0NTQ4MDY0Njk1YzBmMzFiZWVjMWVlMzU2ZjMzYjkxPiAvVUUgPDM1MWFjMTU4ZWMzNDY4MD',
	'UyNzA4ZTY1NzU4YTM2MTg4ZTcxYTZmZWQyYzE5ZmVlYzYzZTU1NTZiNTBlNDhlY2E+IC9WIDUgPj4KZW5kb2JqCnhyZWYKMCA1CjAwMDAwMDAw',
	'MDAgNjU1MzUgZiAKMDAwMDAwMDAxNSAwMDAwMCBuIAowMDAwMDAwMTMwIDAwMDAwIG4gCjAwMDAwMDAxODkgMDAwMDAgbiAKMDAwMDAwMDI1OC',
	'AwMDAwMCBuIAp0cmFpbGVyIDw8IC9Sb290IDEgMCBSIC9TaXplIDUgL0lEIFs8ZjgwZjJmMGUxY2NhOTQxYzkwYjhlODYwMzAzMWQwNTU+PGY4',
	'MGYyZjBlMWNjYTk0MWM5MGI4ZTg2MDMwMzFkMDU1Pl0gL0VuY3J5cHQgNCAwIFIgPj4Kc3RhcnR4cmVmCjgwOAolJUVPRgo='
].join('');

describe('inspectPdf', () => {
	test.each([1, 12])('counts %i pages', async (pages) => {
		expect(await inspectPdf(pdfInMemory(pdf(pages)))).toEqual({ pages, encrypted: false, broken: false });
	});

	test('a document that needs a password is encrypted, not broken', async () => {
		expect(await inspectPdf(pdfInMemory(pdf(2, LOCKED)))).toEqual({ pages: null, encrypted: true, broken: false });
	});

	test('a document that opens but restricts its use is encrypted too', async () => {
		const content = Buffer.from(RESTRICTED, 'base64');
		expect(await inspectPdf(pdfInMemory(content))).toEqual({ pages: 1, encrypted: true, broken: false });
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
