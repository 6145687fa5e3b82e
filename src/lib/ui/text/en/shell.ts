export const shell = {
	skip: 'Skip to the sheet',
	contentsOfWorkspace: 'Workspace',
	contentsOfProduct: 'Contents of the product',
	products: 'Products',
	more: 'More',
	find: 'Find a product',
	findKey: '/',
	signOut: 'Sign out',
	account: 'Account',
	preparedBy: (workspace: string) => `prepared by ${workspace}`,
	clientFoot: 'Costmary computes and documents; it compares words and figures and judges no picture or colour.',
	theme: { label: 'Theme', light: 'Light', dark: 'Dark', system: 'System' },
	place: 'Place',
	margin: 'Margin',
	closeMargin: 'Close the margin',
	entries: {
		desk: 'Desk',
		products: 'Products',
		materials: 'Materials',
		formulas: 'Formulas',
		evidence: 'Evidence',
		rules: 'Rule book',
		people: 'People'
	},
	parts: {
		formula: 'Formula',
		composition: 'Composition',
		list: 'Ingredient list',
		claims: 'Claims',
		label: 'Label',
		file: 'Product file'
	},
	shortParts: {
		formula: 'Formula',
		composition: 'Comp.',
		list: 'List',
		claims: 'Claims',
		label: 'Label',
		file: 'File'
	},
	roles: {
		officer: 'regulatory officer',
		formulator: 'formulator',
		assessor: 'safety assessor',
		administrator: 'administrator',
		client: 'client'
	},
	keys: {
		button: 'Keys',
		title: 'Keys',
		off: 'Single keys are switched off. Arrow keys, Enter and Escape always work.',
		switchOff: 'Switch single keys off',
		switchOn: 'Switch single keys on',
		search: 'search',
		edit: 'edit',
		help: 'this list',
		go: (place: string) => `go to ${place}`,
		rows: 'move between rows',
		openRow: 'open the row',
		then: 'then',
		arrows: 'Arrow keys',
		enter: 'Enter',
		close: 'close the margin or a dialog',
		escape: 'Esc'
	}
};
