import { projectPath } from './layers.js';

const SPOKEN_ATTRIBUTES = new Set([
	'alt',
	'aria-description',
	'aria-label',
	'aria-placeholder',
	'aria-roledescription',
	'aria-valuetext',
	'caption',
	'heading',
	'hint',
	'label',
	'placeholder',
	'summary',
	'title'
]);

const letters = (text) => text.match(/\p{L}/gu)?.length ?? 0;
const isSentence = (text) => letters(text) >= 2;

/** Every sentence a person reads or hears comes from src/lib/ui/text by its code, so that a second language can follow. */
export const literalText = {
	meta: {
		type: 'problem',
		schema: [],
		messages: { literal: 'Text stands in src/lib/ui/text, not in a component: "{{text}}".' }
	},
	create(context) {
		const file = projectPath(context.cwd, context.filename);
		if (!file || !file.endsWith('.svelte') || file.startsWith('src/lib/ui/text/')) return {};
		const report = (node, text) => {
			const short = text.trim().replace(/\s+/g, ' ').slice(0, 40);
			context.report({ node, messageId: 'literal', data: { text: short } });
		};
		const spokenExpression = (expression) => {
			if (expression?.type === 'Literal' && typeof expression.value === 'string' && isSentence(expression.value)) {
				report(expression, expression.value);
			} else if (expression?.type === 'TemplateLiteral') {
				const text = expression.quasis.map((quasi) => quasi.value.cooked ?? '').join(' ');
				if (isSentence(text)) report(expression, text);
			} else if (expression?.type === 'ConditionalExpression') {
				spokenExpression(expression.consequent);
				spokenExpression(expression.alternate);
			}
		};
		return {
			SvelteText(node) {
				if (node.parent?.type === 'SvelteStyleElement' || node.parent?.type === 'SvelteScriptElement') return;
				if (isSentence(node.value)) report(node, node.value);
			},
			SvelteMustacheTag(node) {
				if (node.parent?.type === 'SvelteAttribute') {
					if (SPOKEN_ATTRIBUTES.has(node.parent.key.name)) spokenExpression(node.expression);
				} else if (node.parent?.type !== 'SvelteStyleDirective') {
					spokenExpression(node.expression);
				}
			},
			SvelteAttribute(node) {
				if (!SPOKEN_ATTRIBUTES.has(node.key.name)) return;
				for (const part of node.value) {
					if (part.type === 'SvelteLiteral' && isSentence(part.value)) report(part, part.value);
				}
			}
		};
	}
};
