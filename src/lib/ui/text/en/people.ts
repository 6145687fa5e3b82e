export const people = {
	title: 'People',
	sentence: (people: number, clients: number) =>
		`${people} ${people === 1 ? 'person' : 'people'} and ${clients} ${clients === 1 ? 'client' : 'clients'}. A person is staff with one or more roles, or belongs to one client; never both.`,
	caption: 'People and their roles',
	find: 'Name or e-mail',
	name: 'Name',
	email: 'E-mail',
	roles: 'Roles',
	client: 'Client',
	add: 'Add a person',
	addClient: 'Add a client',
	clientName: 'Name of the client',
	clients: 'Clients',
	noClients: 'No client yet. A product is always made for one.',
	password: 'First password',
	passwordHint: 'Leave it empty: an invitation is mailed, and the person chooses one.',
	invite: 'Mail a link',
	inviteOf: (name: string) => `Mail ${name} a link to choose a password`,
	staffRoles: 'Roles in the laboratory',
	orClient: 'Or the client this person belongs to',
	noClient: 'no client: a person of the laboratory',
	disabled: 'cannot sign in',
	role: {
		officer: 'regulatory officer',
		formulator: 'formulator',
		assessor: 'safety assessor',
		administrator: 'administrator',
		client: 'client'
	},
	mailed: 'A link to choose a password is on its way.',
	addedPerson: 'The person is added, and can sign in with the password given or by the link that is mailed.',
	addedClient: 'The client is there; products can be made for it.',
	faults: {
		name: 'The name is missing, or longer than 200 characters.',
		email: (value: string) => (value ? `“${value}” is no e-mail address.` : 'The e-mail address is missing.'),
		password: (length: number) => `The password has ${length} characters; at least 12 and at most 200 are needed.`,
		side: 'Give either roles in the laboratory or one client, not both and not neither.',
		clientName: 'The name of the client is missing, or longer than 200 characters.'
	},
	marginTitle: 'Who may do what',
	margin: [
		{
			who: 'regulatory officer',
			may: 'compiles products, label copies, claims and files; approves for the laboratory'
		},
		{ who: 'formulator', may: 'edits and releases materials and formulas; supplies documents' },
		{ who: 'safety assessor', may: 'reads the products assigned to them' },
		{ who: 'administrator', may: 'adds people and clients; this alone gives no right to approve or issue' },
		{ who: 'client', may: 'sees own products; approves label copies or sends them back; downloads' }
	]
};
