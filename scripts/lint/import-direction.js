import { isTest, LAYERS, layerOf, projectPath, targetLayer, targetOf } from './layers.js';

/** Imports go one way through the house; the table of layers.js says which. */
export const importDirection = {
	meta: {
		type: 'problem',
		schema: [],
		messages: {
			layer: '{{from}} may not import {{to}} ("{{specifier}}").',
			typesOnly: '{{from}} may take only types from {{to}} ("{{specifier}}").',
			package: '{{from}} may not import the package "{{specifier}}".'
		}
	},
	create(context) {
		const file = projectPath(context.cwd, context.filename);
		const from = file && layerOf(file);
		const rules = from && LAYERS[from];
		if (!rules) return {};

		const judge = (node, specifier, typesOnly) => {
			const target = targetOf(specifier, file);
			if (target === null) {
				if (!isTest(file) && !typesOnly && rules.refusedPackages.test(specifier)) {
					context.report({ node, messageId: 'package', data: { from, specifier } });
				}
				return;
			}
			const to = targetLayer(target);
			if (to === null || rules.imports.includes(to)) return;
			// A test may lean on the helpers of tests/, which no shipped module can.
			if (isTest(file) && to === 'tests') return;
			if (rules.types.includes(to)) {
				if (!typesOnly) context.report({ node, messageId: 'typesOnly', data: { from, to, specifier } });
				return;
			}
			context.report({ node, messageId: 'layer', data: { from, to, specifier } });
		};

		const declaration = (node) => {
			if (node.source) judge(node.source, node.source.value, isTypesOnly(node));
		};
		return {
			ImportDeclaration: declaration,
			ExportNamedDeclaration: declaration,
			ExportAllDeclaration: declaration,
			ImportExpression(node) {
				if (typeof node.source.value === 'string') judge(node.source, node.source.value, false);
			},
			TSImportType(node) {
				const literal = node.source ?? node.argument?.literal;
				if (typeof literal?.value === 'string') judge(literal, literal.value, true);
			},
			CallExpression(node) {
				for (const literal of globbed(node)) judge(literal, literal.value, false);
			}
		};
	}
};

function isTypesOnly(node) {
	if (node.importKind === 'type' || node.exportKind === 'type') return true;
	const specifiers = node.specifiers ?? [];
	return specifiers.length > 0 && specifiers.every((each) => (each.importKind ?? each.exportKind) === 'type');
}

/** import.meta.glob reaches files as an import does, so it obeys the same direction. */
function globbed(node) {
	const { callee } = node;
	if (callee.type !== 'MemberExpression' || callee.object.type !== 'MetaProperty') return [];
	if (callee.property.name !== 'glob') return [];
	const [first] = node.arguments;
	const patterns = first?.type === 'ArrayExpression' ? first.elements : [first];
	return patterns.filter((each) => typeof each?.value === 'string' && !each.value.startsWith('!'));
}
