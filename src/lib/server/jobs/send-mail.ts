import { systemActor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { transport } from '$lib/server/mail/transport';
import { Outbox } from '$lib/server/models/outbox';
import { record } from '$lib/server/record';
import { MOST_ATTEMPTS } from '$lib/server/services/outbox';
import { settings } from '$lib/server/settings';

/**
 * Sends one mail of the outbox. Throws when it could not be sent, so that the queue tries again
 * later; the last attempt marks the mail dead instead. An attempt is counted before it is made:
 * a mail that ends its worker must not be tried for ever.
 */
export async function sendMail({ outboxId }: { outboxId: string }): Promise<void> {
	const mail = await Outbox.findByPk(outboxId);
	if (!mail || mail.sentAt || mail.deadAt) return;
	await mail.update({ attempts: mail.attempts + 1, lastAttemptAt: now() });
	try {
		await (
			await transport()
		).sendMail({
			// The same id at every attempt: a receiver that got it before drops the second one.
			messageId: `<${mail.id}@quarterturn>`,
			from: settings().mailFrom,
			to: mail.toEmail,
			subject: mail.subject,
			text: mail.bodyText
		});
	} catch (fault) {
		await failed(mail, fault instanceof Error ? fault : new Error(String(fault)));
		return;
	}
	await record(systemActor(), async (w) => {
		await mail.update({ sentAt: now(), lastError: null }, { transaction: w.t });
		await w.log('mail.sent', { kind: 'outbox', id: mail.id }, { kind: mail.kind });
	});
}

async function failed(mail: Outbox, fault: Error): Promise<void> {
	if (mail.attempts < MOST_ATTEMPTS) {
		await mail.update({ lastError: fault.message });
		throw fault;
	}
	await record(systemActor(), async (w) => {
		await mail.update({ lastError: fault.message, deadAt: now() }, { transaction: w.t });
		await w.log('mail.given-up', { kind: 'outbox', id: mail.id }, { attempts: mail.attempts });
	});
}
