import { isTest, layerOf, projectPath } from './layers.js';

const FREE_LAYERS = new Set(['scripts', 'tests', 'bucket stand-in']);
const THE_READER = /^src\/lib\/server\/config\.ts$/;

/** One module reads the environment; everything else is given what it needs. */
export const environment = {
	meta: {
		type: 'problem',
		schema: [],
		messages: { environment: 'The environment is read in src/lib/server/config.ts only.' }
	},
	create(context) {
		const file = projectPath(context.cwd, context.filename);
		const layer = file && layerOf(file);
		if (!layer || FREE_LAYERS.has(layer) || isTest(file) || THE_READER.test(file)) return {};
		return {
			MemberExpression(node) {
				const property = node.computed ? node.property.value : node.property.name;
				const owner = node.object.name ?? node.object.property?.name;
				if (property === 'env' && (owner === 'process' || node.object.type === 'MetaProperty')) {
					context.report({ node, messageId: 'environment' });
				}
			},
			VariableDeclarator(node) {
				if (node.init?.name !== 'process' || node.id.type !== 'ObjectPattern') return;
				for (const each of node.id.properties) {
					if (each.key?.name === 'env') context.report({ node: each, messageId: 'environment' });
				}
			}
		};
	}
};
