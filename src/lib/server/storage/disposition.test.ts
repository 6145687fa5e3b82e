import { describe, expect, test } from 'vitest';
import { contentDisposition } from './disposition';

describe('contentDisposition', () => {
	test.each([
		['a.pdf', `attachment; filename="a.pdf"; filename*=UTF-8''a.pdf`],
		['Prüfung (2).pdf', `attachment; filename="Prufung (2).pdf"; filename*=UTF-8''Pr%C3%BCfung%20%282%29.pdf`],
		['β.pdf', `attachment; filename="_.pdf"; filename*=UTF-8''%CE%B2.pdf`],
		["it's*.pdf", `attachment; filename="it_s_.pdf"; filename*=UTF-8''it%27s_.pdf`]
	])('%s', (name, header) => expect(contentDisposition('attachment', name)).toBe(header));

	test.each(['a"; filename="b.exe', 'a\r\nx: y', 'a\\b"c', '%22;a', 'a\u0000b'])(
		'%j cannot leave its place',
		(name) => {
			const header = contentDisposition('inline', name);
			expect(header).toMatch(
				/^inline; filename="[A-Za-z0-9 ._()+,=@~-]+"; filename\*=UTF-8''[A-Za-z0-9%!#$&+.^_`|~-]+$/
			);
		}
	);
});
