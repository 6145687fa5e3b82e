import { describe, expect, test } from 'vitest';
import { sniff } from './sniff';

const bytes = (text: string) => new TextEncoder().encode(text);
const PNG = Buffer.from('89504e470d0a1a0a0000000d4948445200000001000000010806000000', 'hex');

/** One stored entry as it stands at the beginning of a ZIP archive. */
function zipEntry(name: string, content: string): Buffer {
	const header = Buffer.alloc(30);
	header.writeUInt32LE(0x04034b50, 0);
	header.writeUInt16LE(20, 4);
	header.writeUInt32LE(content.length, 18);
	header.writeUInt32LE(content.length, 22);
	header.writeUInt16LE(name.length, 26);
	return Buffer.concat([header, Buffer.from(name), Buffer.from(content)]);
}

describe('kinds we keep', () => {
	test.each([
		['a PDF', 'a.pdf', bytes('%PDF-1.7\n%âãÏÓ\n'), 'pdf'],
		['a picture', 'a.png', PNG, 'png'],
		[
			'a workbook',
			'a.xlsx',
			Buffer.concat([zipEntry('docProps/app.xml', '<a/>'), zipEntry('xl/workbook.xml', '<w/>')]),
			'xlsx'
		],
		['a text document', 'a.docx', zipEntry('word/document.xml', '<w/>'), 'docx'],
		['a table with commas', 'a.csv', bytes('inci,low,high\nAqua,1,2\n'), 'csv'],
		['a table with semicolons and decimal commas', 'a.csv', bytes('inci;share\nAqua;1,5\nGlycerin;2,25\n'), 'csv'],
		['a table with a quoted comma', 'a.csv', bytes('a,b\n"x, y",1\n"z ""q"", w",2\n'), 'csv'],
		['a table of one column by its name', 'a.csv', bytes('inci\nAqua\n'), 'csv'],
		['plain text', 'a.txt', bytes('Kept at 25 °C, in the dark.\n'), 'text'],
		['text of one line', 'note', bytes('one, two'), 'text'],
		['text of an older machine', 'a.txt', Buffer.from([0x4b, 0xe4, 0x73, 0x65, 0x0a]), 'text'],
		['text in UTF-16', 'a.txt', Buffer.from('\ufeffAqua', 'utf16le'), 'text']
	])('%s', async (_what, name, head, kind) => {
		expect(await sniff(head, name)).toEqual({ taken: true, kind, renamed: false });
	});
});

describe('a name that promises another kind is told apart', () => {
	test.each([
		['a.docx', bytes('%PDF-1.7\n'), 'pdf'],
		['a.pdf', PNG, 'png'],
		['a.pdf', bytes('just words\n'), 'text'],
		['a.pdf', bytes('a;b\n1;2\n'), 'csv']
	])('%s', async (name, head, kind) => {
		expect(await sniff(head, name)).toEqual({ taken: true, kind, renamed: true });
	});
});

describe('what we do not keep', () => {
	test.each([
		['a program', Buffer.from('4d5a900003000000', 'hex')],
		['a page that could run', bytes('  <!DOCTYPE html><script>1</script>')],
		['a drawing that could run', bytes('<svg xmlns="http://www.w3.org/2000/svg"/>')],
		['an archive of anything', zipEntry('a.exe', 'MZ')],
		['bytes of no kind', Buffer.from([1, 2, 3, 0, 5])]
	])('%s, though it is called a.pdf', async (_what, head) => {
		expect(await sniff(head, 'a.pdf')).toMatchObject({ taken: false });
	});
});
