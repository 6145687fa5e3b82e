import { isTest, layerOf, projectPath } from './layers.js';

const REFUSED_MEMBERS = new Map([
	['Date.now', 'take the day as an argument'],
	['Math.random', 'the same data must give the same answer'],
	['Number.parseFloat', 'quantities are exact: use parseDecimal'],
	['performance.now', 'take the day as an argument'],
	['crypto.randomUUID', 'the same data must give the same answer'],
	['crypto.getRandomValues', 'the same data must give the same answer']
]);

/** The computation reads no clock, draws no chance and never leaves exact numbers. */
export const pureDomain = {
	meta: {
		type: 'problem',
		schema: [],
		messages: { impure: '{{what}} is not for the domain: {{why}}.' }
	},
	create(context) {
		const file = projectPath(context.cwd, context.filename);
		if (!file || layerOf(file) !== 'domain' || isTest(file)) return {};
		const report = (node, what, why) => context.report({ node, messageId: 'impure', data: { what, why } });
		return {
			NewExpression(node) {
				if (node.callee.name === 'Date' && node.arguments.length === 0) {
					report(node, 'new Date()', 'take the day as an argument');
				}
			},
			CallExpression(node) {
				if (node.callee.name === 'Date') report(node, 'Date()', 'take the day as an argument');
				if (node.callee.name === 'parseFloat') report(node, 'parseFloat', 'quantities are exact: use parseDecimal');
			},
			MemberExpression(node) {
				const property = node.computed ? node.property.value : node.property.name;
				const what = `${node.object.name}.${property}`;
				const why = REFUSED_MEMBERS.get(what);
				if (why) report(node, what, why);
			}
		};
	}
};
