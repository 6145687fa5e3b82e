export const door = {
	signIn: 'Sign in',
	signingIn: 'Signing in …',
	to: (workspace: string) => `to ${workspace}`,
	email: 'E-mail',
	password: 'Password',
	invited: 'No account yet? The administrator of the laboratory invites you.',
	caution:
		'Costmary computes and documents. It does not replace the safety assessor, the responsible person, a laboratory or an authority.',
	promise: 'Every printed line can be followed back to a weighed gram, a document and a rule.',
	plate: 'What Costmary does',
	leaf: 'A costmary leaf pressed between pages',
	species: 'Tanacetum balsamita',
	caption: ', costmary. Once pressed between pages to keep the place.',
	emailInvalid: (value: string) =>
		value ? `“${value}” is no e-mail address; it needs a name, an @ and a domain.` : 'The e-mail address is missing.',
	passwordMissing: 'The password is missing.',
	trail: {
		printed: { label: 'Printed line', text: 'Phenoxyethanol, 10th name' },
		weighed: { label: 'Weighed', text: '1.00 g of Wardol 90 in every 100 g' },
		document: { label: 'Document', text: 'Composition statement WD-90, rev. 2' },
		rule: { label: 'Rule', text: 'Reg. (EC) 1223/2009, Art. 19(1)(g)' }
	}
};
