import { layerOf, projectPath, targetOf } from './layers.js';

const BOUND_LAYERS = new Set(['server', 'entry', 'routes', 'server routes']);
const HOME = 'src/lib/server/db/';
const HANDLES = new Set(['db', 'pool', 'database']);
const MAKERS = new Set(['Pool', 'Client', 'Kysely', 'PostgresDialect']);

/** Outside server/db a query runs inside withActor: a bare handle would run without row-level security. */
export const databaseHandle = {
	meta: {
		type: 'problem',
		schema: [],
		messages: {
			maker: '{{name}} is made in src/lib/server/db only; use withActor.',
			handle: 'The handle "{{name}}" stays in src/lib/server/db; use withActor.'
		}
	},
	create(context) {
		const file = projectPath(context.cwd, context.filename);
		const layer = file && layerOf(file);
		if (!layer || !BOUND_LAYERS.has(layer) || file.startsWith(HOME)) return {};
		return {
			NewExpression(node) {
				const name = node.callee.name ?? node.callee.property?.name;
				if (MAKERS.has(name)) context.report({ node, messageId: 'maker', data: { name } });
			},
			ImportDeclaration(node) {
				if (!`${targetOf(node.source.value, file)}/`.startsWith(HOME) || node.importKind === 'type') return;
				for (const each of node.specifiers) {
					const name = each.imported?.name;
					if (each.importKind !== 'type' && HANDLES.has(name)) {
						context.report({ node: each, messageId: 'handle', data: { name } });
					}
				}
			}
		};
	}
};
