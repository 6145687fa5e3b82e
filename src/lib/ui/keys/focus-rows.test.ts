import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { focusRows, nextRow } from './focus-rows';

describe('where a key moves the focus', () => {
	test.each([
		{ why: 'down by one', from: 1, key: 'ArrowDown', to: 2 },
		{ why: 'up by one', from: 1, key: 'ArrowUp', to: 0 },
		{ why: 'never past the end', from: 3, key: 'ArrowDown', to: 3 },
		{ why: 'never before the first', from: 0, key: 'ArrowUp', to: 0 },
		{ why: 'to the first', from: 3, key: 'Home', to: 0 },
		{ why: 'to the last', from: 0, key: 'End', to: 3 },
		{ why: 'a page stops at the end', from: 0, key: 'PageDown', to: 3 },
		{ why: 'a letter moves nothing', from: 0, key: 'x', to: null }
	])('$why', ({ from, key, to }) => expect(nextRow(4, from, key)).toBe(to));

	test('no rows, no move', () => expect(nextRow(0, 0, 'ArrowDown')).toBeNull());
});

describe('a table with rows', () => {
	let table: HTMLTableElement;
	let stop: (() => void) | void;
	const onrow = vi.fn();
	const onopen = vi.fn();
	const row = (key: string) => table.querySelector<HTMLElement>(`[data-row="${key}"]`)!;
	const press = (target: Element, key: string) =>
		target.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));

	beforeEach(() => {
		table = document.createElement('table');
		table.innerHTML = `<tbody><tr data-row="a"><td><input></td></tr><tr class="sub"><td></td></tr>
			<tr data-row="b" aria-current="true"><td></td></tr><tr data-row="c"><td></td></tr></tbody>`;
		document.body.append(table);
		stop = focusRows(() => ({ onrow, onopen }))(table);
	});
	afterEach(() => {
		stop?.();
		table.remove();
		onrow.mockReset();
		onopen.mockReset();
	});

	test('only the current row is in the tab order', () => {
		expect(['a', 'b', 'c'].map((key) => row(key).tabIndex)).toEqual([-1, 0, -1]);
	});
	test('an arrow key moves the focus and the page hears of it', () => {
		row('b').focus();
		press(row('b'), 'ArrowDown');
		expect(document.activeElement).toBe(row('c'));
		expect(onrow).toHaveBeenLastCalledWith('c');
		expect(row('c').tabIndex).toBe(0);
		expect(row('b').tabIndex).toBe(-1);
	});
	test('a row that is none is stepped over', () => {
		row('b').focus();
		press(row('b'), 'ArrowUp');
		expect(document.activeElement).toBe(row('a'));
	});
	test('Enter opens the row that has the focus', () => {
		row('b').focus();
		press(row('b'), 'Enter');
		expect(onopen).toHaveBeenCalledWith('b');
	});
	test('a field keeps its own arrow keys', () => {
		const input = table.querySelector('input')!;
		input.focus();
		press(input, 'ArrowDown');
		expect(document.activeElement).toBe(input);
	});
});
