import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { diffTexts } from './diff';

const text = (parts: ReturnType<typeof diffTexts>, kind: 'added' | 'removed') =>
	parts
		.filter((part) => part.kind === 'same' || part.kind === kind)
		.map((part) => part.text)
		.join('');

describe('what became of a text', () => {
	test('a name that came is marked', () => {
		const parts = diffTexts('Limonene, Linalool', 'Limonene, Linalool, Linalyl Acetate');
		expect(parts.filter((part) => part.kind === 'removed')).toEqual([]);
		expect(parts.at(-1)).toEqual({ kind: 'added', text: ', Linalyl Acetate' });
	});
	test('an equal text is one part', () => {
		expect(diffTexts('1,2-Hexanediol, Aqua', '1,2-Hexanediol, Aqua')).toEqual([
			{ kind: 'same', text: '1,2-Hexanediol, Aqua' }
		]);
	});
	test('nothing is lost of either text', () => {
		const words = fc.array(fc.constantFrom('Aqua', 'Glycerin', 'CI 77491', ', ', ' ', '1,2-Hexanediol', ',', '\n'));
		fc.assert(
			fc.property(words, words, (a, b) => {
				const [before, after] = [a.join(''), b.join('')];
				const parts = diffTexts(before, after);
				expect(text(parts, 'removed')).toBe(before);
				expect(text(parts, 'added')).toBe(after);
			})
		);
	});
});
