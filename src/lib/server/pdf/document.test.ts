import { describe, expect, test } from 'vitest';
import { renderPdf } from './document';
import { asOneLine, pagesOf } from './testing';

const details = {
	creationDate: new Date('2026-12-01T14:20:00Z'),
	title: 'Probe',
	author: 'Wendmoor Laboratories',
	subject: 'Nightfold Cream'
};

describe('Rendering', () => {
	test('Greek, Cyrillic and signs reach the text layer', async () => {
		const text = 'Значение ≥ 5 µm, ≤ 9 cm², γλυκερίνη, 50 ml ℮, −3 °C → “dry” × ½';
		const bold = { text: `bold ${text}`, bold: true };
		const italic = { text: `slanted ${text}`, italics: true };
		const code = { text: `code ${text}`, font: 'Mono' };
		const file = await renderPdf({ content: [text, bold, italic, code], defaultStyle: { font: 'Noto' } }, details);
		const page = asOneLine((await pagesOf(file)).join(' '));
		for (const start of ['', 'bold ', 'slanted ', 'code '])
			expect(page).toContain(asOneLine(`${start}${text}`.normalize('NFKC')));
	});

	test('the caller’s definition stays as it was, so it can be rendered again to the same bytes', async () => {
		const definition = { content: ['One ≥ two'], defaultStyle: { font: 'Noto' } };
		const first = await renderPdf(definition, details);
		expect(definition.content).toEqual(['One ≥ two']);
		expect(Buffer.compare(first, await renderPdf(definition, details))).toBe(0);
	});

	test('another date is another file', async () => {
		const definition = { content: ['One'], defaultStyle: { font: 'Noto' } };
		const later = { ...details, creationDate: new Date('2026-12-02T14:20:00Z') };
		expect(Buffer.compare(await renderPdf(definition, details), await renderPdf(definition, later))).not.toBe(0);
	});

	test('a picture from the network or the disk is refused', async () => {
		for (const image of ['http://127.0.0.1:9/a.png', '/etc/hostname'])
			await expect(renderPdf({ content: [{ image }], defaultStyle: { font: 'Noto' } }, details)).rejects.toThrow();
	});
});
