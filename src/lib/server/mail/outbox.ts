import { createTransport } from 'nodemailer';
import { writeMail, type MailData, type MailTemplate } from '../../../../templates/mail/index';
import { config } from '../config';
import { newId } from '../db/id';
import { markSent, overdueMails, waitingMail } from '../db/outbox';
import type { Trx } from '../db/with-actor';
import { sendInTransaction } from '../jobs/queue';

/** Puts a mail in the outbox in the transaction that causes it; the worker sends it. */
export async function enqueueMail<Name extends MailTemplate>(
	trx: Trx,
	to: string,
	template: Name,
	data: MailData[Name]
): Promise<void> {
	const id = newId();
	const host = new URL(config().origin).hostname;
	await trx
		.insertInto('outbox_mail')
		.values({ id, message_id: `<${id}@${host}>`, to_address: to, template, data: JSON.stringify(data) })
		.execute();
	await sendInTransaction(trx, 'mail', { mailId: id });
}

/**
 * Sends a waiting mail. Sent again after a crash it has the same Message-ID and the same link, so that a reader gets it at
 * least once and never two different links.
 */
export async function deliverMail(mailId: string): Promise<void> {
	const row = await waitingMail(mailId);
	if (!row) return;
	const { smtpUrl, workspaceName, origin } = config();
	if (!smtpUrl) throw new Error('SMTP_URL is not set, so no mail can leave');
	const transport = createTransport(smtpUrl);
	const { subject, text } = writeMail(row.template, row.data as never);
	try {
		await transport.sendMail({
			from: { name: workspaceName, address: `costmary@${new URL(origin).hostname}` },
			to: row.to_address,
			messageId: row.message_id,
			subject,
			text
		});
	} finally {
		transport.close();
	}
	await markSent(mailId, new Date());
}

const OVERDUE_MS = 60 * 60 * 1000;

/** Tries again what the queue has given up, so that a mail server that was down for a day loses nothing. */
export async function sweepMails(now: Date): Promise<void> {
	for (const { id } of await overdueMails(new Date(now.getTime() - OVERDUE_MS))) {
		await deliverMail(id).catch((error: unknown) => console.error(JSON.stringify({ mail: id, error: String(error) })));
	}
}
