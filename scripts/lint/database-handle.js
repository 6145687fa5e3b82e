import { layerOf, projectPath, targetOf } from './layers.js';

const BOUND_LAYERS = new Set(['server', 'entry', 'routes', 'server routes']);
const HOME = 'src/lib/server/db/';
// Signing in happens before there is an actor, so auth asks for the handle too.
const MAY_ASK = [HOME, 'src/lib/server/auth/'];
const HANDLES = new Set(['handle', 'db', 'pool', 'database']);
const MAKERS = new Set(['Pool', 'Client', 'Kysely', 'PostgresDialect']);

/** Outside server/db a query runs inside withActor: a bare handle would run without row-level security. */
export const databaseHandle = {
	meta: {
		type: 'problem',
		schema: [],
		messages: {
			maker: '{{name}} is made in src/lib/server/db only; use withActor.',
			handle: 'The handle "{{name}}" stays in src/lib/server/db and auth; use withActor.'
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
				if (node.importKind === 'type' || MAY_ASK.some((folder) => file.startsWith(folder))) return;
				if (!`${targetOf(node.source.value, file)}/`.startsWith(HOME)) return;
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
