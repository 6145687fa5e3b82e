import { handle } from './pool';

/** A mail that waits to be sent, or undefined when it has left already. */
export const waitingMail = (id: string) =>
	handle()
		.selectFrom('outbox_mail')
		.select(['message_id', 'to_address', 'template', 'data'])
		.where('id', '=', id)
		.where('state', '=', 'waiting')
		.executeTakeFirst();

/** Mails that should have left by then; at most a hundred at a time. */
export const overdueMails = (before: Date) =>
	handle()
		.selectFrom('outbox_mail')
		.select('id')
		.where('state', '=', 'waiting')
		.where('created_at', '<', before)
		.orderBy('created_at')
		.limit(100)
		.execute();

/** What a mail said is forgotten once it is sent: links are secrets. */
export const markSent = (id: string, at: Date) =>
	handle()
		.updateTable('outbox_mail')
		.set({ state: 'sent', sent_at: at, data: JSON.stringify({}) })
		.where('id', '=', id)
		.execute();
