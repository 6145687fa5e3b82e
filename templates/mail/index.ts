/** What each mail is made of; ready to print. */
export interface MailData {
	readonly invitation: {
		readonly name: string;
		readonly workspace: string;
		readonly link: string;
		readonly until: string;
	};
	readonly reset: { readonly name: string; readonly workspace: string; readonly link: string; readonly until: string };
	readonly passwordChanged: { readonly name: string; readonly workspace: string; readonly address: string };
}
export type MailTemplate = keyof MailData;

export interface WrittenMail {
	readonly subject: string;
	readonly text: string;
}

type Templates = { readonly [Name in MailTemplate]: (data: MailData[Name]) => WrittenMail };

/** Plain text, so that nothing in a mail loads anything. */
const EN: Templates = {
	invitation: ({ name, workspace, link, until }) => ({
		subject: `Your account at ${workspace}`,
		text: [
			`${name},`,
			`${workspace} has made an account for you. Choose a password here; the link works once, until ${until}:`,
			link,
			'If you did not expect this, ignore it: without the link nobody can use the account.'
		].join('\n\n')
	}),
	reset: ({ name, workspace, link, until }) => ({
		subject: `A new password for ${workspace}`,
		text: [
			`${name},`,
			`somebody asked for a new password for your account at ${workspace}. Choose one here; the link works once, until ${until}:`,
			link,
			'If it was not you, ignore this mail. Your password stays as it is.'
		].join('\n\n')
	}),
	passwordChanged: ({ name, workspace, address }) => ({
		subject: `Your password at ${workspace} was changed`,
		text: [
			`${name},`,
			`the password of your account at ${workspace} was changed, and every other sign-in was ended.`,
			`If it was not you, ask for a new one at ${address} and tell the administrator.`
		].join('\n\n')
	})
};

export const writeMail = <Name extends MailTemplate>(template: Name, data: MailData[Name]): WrittenMail =>
	EN[template](data);
