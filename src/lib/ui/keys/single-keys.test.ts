import { expect, test } from 'vitest';
import { isSingleKey, keyDeed } from './single-keys';

test.each([
	{ why: 'a slash looks for something', key: '/', waiting: false, deed: { deed: 'search' } },
	{ why: 'a question mark helps', key: '?', waiting: false, deed: { deed: 'help' } },
	{ why: 'g waits for a letter', key: 'g', waiting: false, deed: { deed: 'wait' } },
	{ why: 'g, then m goes to the materials', key: 'm', waiting: true, deed: { deed: 'go', place: 'materials' } },
	{ why: 'after g, e goes and does not edit', key: 'e', waiting: true, deed: { deed: 'go', place: 'evidence' } },
	{ why: 'after g, another letter does nothing', key: 'x', waiting: true, deed: null },
	{ why: 'm alone does nothing', key: 'm', waiting: false, deed: null }
])('$why', ({ key, waiting, deed }) => expect(keyDeed(key, waiting)).toEqual(deed));

test('keys rest where text is typed and while a modifier is held', () => {
	const input = document.createElement('input');
	document.body.append(input);
	const pressed = (target: Element, init: KeyboardEventInit) => {
		const event = new KeyboardEvent('keydown', { bubbles: true, ...init });
		target.dispatchEvent(event);
		return isSingleKey(event);
	};
	expect(pressed(document.body, { key: 'e' })).toBe(true);
	expect(pressed(document.body, { key: 'e', ctrlKey: true })).toBe(false);
	expect(pressed(input, { key: 'e' })).toBe(false);
	input.remove();
});
