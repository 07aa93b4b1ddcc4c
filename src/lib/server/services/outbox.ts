import { Op } from 'sequelize';
import { demand, systemActor, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, NotFound } from '$lib/server/errors';
import { queueOptions } from '$lib/server/jobs/queues';
import { hideLinks } from '$lib/server/mail/links';
import { Outbox } from '$lib/server/models/outbox';
import { record, type Write } from '$lib/server/record';
import { settings } from '$lib/server/settings';

/** After these the mail is dead: it lies in the outbox until somebody sends it again. */
export const MOST_ATTEMPTS = queueOptions['send-mail'].retryLimit + 1;

export interface NewMail {
	/** The same key is never sent twice: a repeated job or a double click makes one mail. */
	dedupeKey: string;
	kind: string;
	to: string;
	toPersonId?: string | null;
	subject: string;
	text: string;
}

export type MailState = 'waiting' | 'sent' | 'dead';

export interface OutboxEntry {
	id: string;
	kind: string;
	to: string;
	subject: string;
	/** Links of one-time use are hidden when mail goes out to a real server. */
	text: string;
	state: MailState;
	createdAt: Date;
	attempts: number;
	lastAttemptAt: Date | null;
	lastError: string | null;
	sentAt: Date | null;
}

/** Puts a mail into the outbox as part of a write. @returns false when its key was there already */
export async function put(w: Write, mail: NewMail): Promise<boolean> {
	const id = await Outbox.putOnce(
		{
			dedupeKey: mail.dedupeKey,
			kind: mail.kind,
			toEmail: mail.to,
			toPersonId: mail.toPersonId ?? null,
			subject: mail.subject,
			bodyText: mail.text
		},
		w.t
	);
	if (id === null) return false;
	await w.enqueue('send-mail', { outboxId: id });
	return true;
}

export async function list(
	by: Actor | null,
	{ state, before }: { state?: MailState; before?: string } = {}
): Promise<{ items: OutboxEntry[]; next: string | null; isCaughtLocally: boolean }> {
	demand(by, 'mail.read');
	const size = 50;
	const rows = await Outbox.findAll({
		where: { ...whereState(state), ...(before && { id: { [Op.lt]: before } }) },
		order: [['id', 'DESC']],
		limit: size + 1
	});
	const isCaughtLocally = !settings().smtpUrl;
	const items = rows.slice(0, size).map((row) => entryOf(row, isCaughtLocally));
	return { items, next: rows.length > size ? items[size - 1].id : null, isCaughtLocally };
}

/** Sends a dead mail again, with all its attempts before it. */
export async function retry(by: Actor | null, id: string): Promise<void> {
	demand(by, 'mail.write');
	await record(by, async (w) => {
		const mail = await Outbox.findByPk(id, { transaction: w.t, lock: true });
		if (!mail) throw new NotFound();
		if (!mail.deadAt) {
			throw new Conflict('not-dead', 'This mail is on its way or sent; nothing was changed.');
		}
		await mail.update({ deadAt: null, attempts: 0 }, { transaction: w.t });
		await w.enqueue('send-mail', { outboxId: id });
		await w.log('mail.retried', { kind: 'outbox', id });
	});
}

/**
 * Mails that wait without a job (a queue restored from an old backup, a job given up while the
 * database was away) get one again. The worker asks at its start; a second job for the same mail
 * finds it sent and does nothing.
 */
export async function wakeForgotten(): Promise<number> {
	const longAgo = new Date(now().getTime() - 24 * 60 * 60 * 1000);
	const rows = await Outbox.findAll({
		where: { ...whereState('waiting'), createdAt: { [Op.lt]: longAgo } },
		limit: 500
	});
	if (rows.length === 0) return 0;
	await record(systemActor(), async (w) => {
		for (const { id } of rows) await w.enqueue('send-mail', { outboxId: id });
		await w.log('mail.woken', { kind: 'outbox', id: null }, { mails: rows.length });
	});
	return rows.length;
}

function whereState(state: MailState | undefined) {
	if (state === 'waiting') return { sentAt: null, deadAt: null };
	if (state === 'sent') return { sentAt: { [Op.ne]: null } };
	if (state === 'dead') return { deadAt: { [Op.ne]: null } };
	return {};
}

function entryOf(row: Outbox, isCaughtLocally: boolean): OutboxEntry {
	return {
		id: row.id,
		kind: row.kind,
		to: row.toEmail,
		subject: row.subject,
		text: isCaughtLocally ? row.bodyText : hideLinks(row.bodyText),
		state: row.sentAt ? 'sent' : row.deadAt ? 'dead' : 'waiting',
		createdAt: row.createdAt,
		attempts: row.attempts,
		lastAttemptAt: row.lastAttemptAt,
		lastError: row.lastError,
		sentAt: row.sentAt
	};
}
