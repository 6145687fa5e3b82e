import { handle } from './pool';

/** A mail that waits to be sent, or undefined when it has left already. */
export const waitingMail = (id: string) =>
	handle()
		.selectFrom('outbox_mail')
		.select(['message_id', 'to_address', 'template', 'data'])
		.where('id', '=', id)
		.where('state', '=', 'waiting')
		.executeTakeFirst();

/** What a mail said is forgotten once it is sent: links are secrets. */
export const markSent = (id: string, at: Date) =>
	handle()
		.updateTable('outbox_mail')
		.set({ state: 'sent', sent_at: at, data: JSON.stringify({}) })
		.where('id', '=', id)
		.execute();
