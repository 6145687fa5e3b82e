/** The content security policy refuses style attributes; a picture carries its geometry in SVG attributes instead. */
export const inlineStyle = {
	meta: {
		type: 'problem',
		schema: [],
		messages: { style: 'No style attribute or style: directive: the content security policy would drop it.' }
	},
	create(context) {
		const report = (node) => context.report({ node, messageId: 'style' });
		return {
			SvelteStyleDirective: report,
			SvelteAttribute(node) {
				if (node.key.name === 'style') report(node);
			}
		};
	}
};
