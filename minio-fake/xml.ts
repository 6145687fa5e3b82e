import { Problem } from './problem';

/** An element to write: its name and either text or children. Undefined children are left out. */
export type Element = readonly [name: string, content: string | number | boolean | readonly (Element | undefined)[]];

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

// Line ends and tabs are written as numbers: a reader would fold them otherwise.
const escape = (text: string): string =>
	text.replace(/[&<>"\r\n\t]/g, (char) => ESCAPES[char] ?? `&#${char.charCodeAt(0)};`);

function write([name, content]: Element): string {
	const inner = Array.isArray(content)
		? content
				.filter((child): child is Element => child !== undefined)
				.map(write)
				.join('')
		: escape(String(content));
	return `<${name}>${inner}</${name}>`;
}

export const xmlDocument = (root: Element): string => `<?xml version="1.0" encoding="UTF-8"?>\n${write(root)}`;

/** An element that was read: text of its own and its child elements. */
export interface Node {
	readonly name: string;
	readonly children: Node[];
	text: string;
}

const ENTITIES: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

const unescape = (text: string): string =>
	text.replace(/&(#x[0-9a-fA-F]{1,6}|#\d{1,7}|[a-z]+);/g, (whole, name: string) => {
		if (!name.startsWith('#')) return ENTITIES[name] ?? whole;
		const code = name.startsWith('#x') ? parseInt(name.slice(2), 16) : parseInt(name.slice(1), 10);
		return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
	});

const malformed = () => new Problem('MalformedXML', 'The request document is not well-formed.');

/** Reads the small documents of S3 requests. Declarations other than <?xml?> are refused, so no entity can be defined. */
export function parseXml(source: string): Node {
	const root: Node = { name: '', children: [], text: '' };
	const open = [root];
	let rest = source.replace(/^\uFEFF?\s*<\?xml[^>]*\?>/, '');
	while (rest !== '') {
		const [token] = /^(?:[^<]+|<[^<>]+>)/.exec(rest) ?? [];
		const at = open.at(-1);
		if (!token || !at) throw malformed();
		rest = rest.slice(token.length);
		if (!token.startsWith('<')) at.text += unescape(token);
		else if (token.startsWith('</')) {
			if (at.name !== token.slice(2, -1).trim() || open.length === 1) throw malformed();
			open.pop();
		} else {
			const name = /^<([A-Za-z][\w.-]*)[^<>]*>$/.exec(token)?.[1];
			if (!name) throw malformed();
			const node: Node = { name, children: [], text: '' };
			at.children.push(node);
			if (!token.endsWith('/>')) open.push(node);
		}
	}
	const [first, ...others] = root.children;
	if (!first || others.length > 0 || open.length !== 1) throw malformed();
	return first;
}

export const childrenOf = (node: Node, name: string): readonly Node[] =>
	node.children.filter((child) => child.name === name);

export const childText = (node: Node, name: string): string | undefined => childrenOf(node, name)[0]?.text;
