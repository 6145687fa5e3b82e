type Data = Readonly<Record<string, unknown>>;

const said = (data: Data, name: string, otherwise: string) => {
	const value = data[name];
	return typeof value === 'string' || typeof value === 'number' ? String(value) : otherwise;
};

/** One sentence for each code that a service refuses with: what happened and what to do next. */
const refused: Record<string, (data: Data) => string> = {
	'not-found': () => 'Nothing stands at this address. It may have been renamed, or it belongs to somebody else.',
	forbidden: () => 'Your role does not permit this. Ask somebody of the role that does.',
	invalid: () => 'Something in the form cannot be taken yet; each field says what it needs.',
	conflict: () => 'Somebody else saved in the meantime. Both values are shown; choose, then save again.',
	exists: (data) => `${said(data, 'value', 'This')} exists already. Choose another, or open the one that is there.`,
	frozen: () => 'This version is released and can no longer be changed. Begin a new version instead.',
	blocked: () => 'Something stands in the way; it is listed on this page with where it is put right.',
	'wrong-state': () => 'This step does not fit the present state. Reload the page to see where it stands.',
	'too-many-attempts': (data) => `Too many attempts. Try again in ${said(data, 'minutes', 'a few')} minutes.`,
	'wrong-credentials': () => 'E-mail and password do not fit together. Check both and try again.',
	'file-too-large': (data) =>
		`${said(data, 'name', 'The file')} is larger than the limit of ${said(data, 'limit', '250 MiB')}. Nothing was stored.`,
	'file-empty': (data) => `${said(data, 'name', 'The file')} has 0 bytes. Choose a file that holds something.`,
	'upload-broken': () => 'The upload was cut off and nothing was kept. Send the file again.',
	'kind-not-taken': (data) =>
		`${said(data, 'kind', 'This kind of file')} is not taken here. Send a PDF, an image or a table.`
};

export const errors = {
	/** The sentence for a refusal; a code without its own sentence still says what to do. */
	refused: (code: string, data: Data = {}) => refused[code]?.(data) ?? errors.unknown,
	unknown: 'This could not be done. Try again; if it stays so, tell the administrator.',
	notFound: {
		title: 'Nothing stands here',
		text: 'The address may have been renamed, or what it names belongs to somebody else.'
	},
	forbidden: { title: 'Not for your role', text: 'Ask somebody whose role permits this page.' },
	broken: {
		title: 'Something broke on our side',
		text: 'Nothing that you saved is lost. Try again in a moment.',
		id: 'Quote this number to the administrator:'
	},
	toStart: 'Go to the start page',
	status: (status: number) => `Status ${status}`
};
