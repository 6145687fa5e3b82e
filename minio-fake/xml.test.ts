import { expect, test } from 'vitest';
import { childrenOf, childText, parseXml, xmlDocument } from './xml';

test('what is written is read again, whatever the text holds', () => {
	const text = `a & b < c > "d" 'e' é\n\t&amp;`;
	const read = parseXml(xmlDocument(['Root', [['Key', text], undefined, ['Empty', []]]]));
	expect(childText(read, 'Key')).toBe(text);
	expect(childrenOf(read, 'Empty')).toHaveLength(1);
});

test('attributes are passed over', () => {
	expect(childText(parseXml('<?xml version="1.0"?><D xmlns="urn:x"><Key a="1">k</Key><Q/></D>'), 'Key')).toBe('k');
});

test.each([
	'',
	'text',
	'<a>',
	'<a></b>',
	'</a>',
	'<a/><b/>',
	'<a><',
	'<!DOCTYPE a [<!ENTITY e "x">]><a>&e;</a>',
	'<a><!-- c --></a>'
])('%s is malformed', (text) => {
	expect(() => parseXml(text)).toThrow(expect.objectContaining({ code: 'MalformedXML' }));
});
