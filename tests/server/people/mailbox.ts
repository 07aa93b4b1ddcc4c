import { db } from '$lib/server/db';
import { Outbox } from '$lib/server/models/outbox';

/** The newest mail to an address, with the one-time secret in it. */
export async function newestMail(to: string): Promise<{ text: string; secret: string }> {
	db();
	const mail = await Outbox.findOne({ where: { toEmail: to }, order: [['id', 'DESC']] });
	if (!mail) throw new Error(`No mail to ${to}`);
	const secret = /\/(?:invitation|reset)\/([\w-]+)/.exec(mail.bodyText)?.[1] ?? '';
	return { text: mail.bodyText, secret };
}
