import { readdir, readFile } from 'node:fs/promises';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { Forbidden } from '$lib/server/errors';
import { sendMail } from '$lib/server/jobs/send-mail';
import { closeTransport } from '$lib/server/mail/transport';
import { Outbox } from '$lib/server/models/outbox';
import { record } from '$lib/server/record';
import * as outbox from '$lib/server/services/outbox';
import { forgetSettings, settings } from '$lib/server/settings';
import { makeActor } from '../../factories/actor';
import { nextNumber } from '../../factories/sequence';
import { ask } from '../invariants/catalogue';
import { refusalOf } from './refusal';

const LINK = `http://localhost:5173/reset/${'s'.repeat(43)}`;

async function put(fields: Partial<outbox.NewMail> = {}) {
	const mail = {
		dedupeKey: `test:${nextNumber()}`,
		kind: 'reset',
		to: 'ada@lab.example',
		subject: 'Grüße aus dem Labor',
		text: `Open ${LINK}\n`,
		...fields
	};
	const isNew = await record(systemActor(), async (w) => {
		const added = await outbox.put(w, mail);
		await w.log('mail.tested', { kind: 'outbox', id: null });
		return added;
	});
	const row = await Outbox.findOne({ where: { dedupeKey: mail.dedupeKey } });
	if (!row) throw new Error('The mail is not in the outbox');
	return { id: row.id, isNew, dedupeKey: mail.dedupeKey };
}

const jobs = (id: string) =>
	ask<{ n: number }>(
		`SELECT count(*) AS n FROM pgboss.job WHERE name = 'send-mail' AND data->>'outboxId' = '${id}'`
	);

async function useServer(url: string | undefined) {
	await closeTransport();
	if (url) process.env.SMTP_URL = url;
	else delete process.env.SMTP_URL;
	forgetSettings();
}

/** A port where nothing listens. */
async function deadPort(): Promise<number> {
	const server = createServer();
	await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
	const address = server.address();
	await new Promise((resolve) => server.close(resolve));
	return typeof address === 'object' && address ? address.port : 0;
}

afterEach(() => useServer(undefined));

describe('the outbox', () => {
	it('takes a mail and its job together, and a key once', async () => {
		const { id, isNew, dedupeKey } = await put();
		expect(isNew).toBe(true);
		expect((await put({ dedupeKey })).isNew).toBe(false);
		expect(await jobs(id)).toEqual([{ n: 1 }]);
	});

	it('keeps neither mail nor job of a write that is given up', async () => {
		const dedupeKey = 'given-up';
		const write = record(systemActor(), async (w) => {
			await outbox.put(w, { dedupeKey, kind: 'x', to: 'a@b.example', subject: 's', text: 't' });
			throw new Error('changed my mind');
		});
		await expect(write).rejects.toThrow('changed my mind');
		expect(await Outbox.count({ where: { dedupeKey } })).toBe(0);
	});

	it('sends to the local catcher when there is no mail server: a file any mail program reads', async () => {
		const { id } = await put();
		await sendMail({ outboxId: id });
		const row = await Outbox.findByPk(id);
		expect(row).toMatchObject({ attempts: 1, deadAt: null, sentAt: expect.any(Date) });
		const folder = join(settings().home, 'mail');
		const files = await Promise.all(
			(await readdir(folder)).map((name) => readFile(join(folder, name), 'utf8'))
		);
		const file = files.find((text) => text.includes(`<${id}@quarterturn>`));
		expect(file).toMatch(/^To: ada@lab\.example$/m);
		expect(file).toContain('/reset/');
	});

	it('sends a mail once, however often its job runs', async () => {
		const { id } = await put();
		await sendMail({ outboxId: id });
		await sendMail({ outboxId: id });
		expect((await Outbox.findByPk(id))?.attempts).toBe(1);
	});

	it('tries again while the server fails, then lays the mail aside as dead', async () => {
		await useServer(`smtp://127.0.0.1:${await deadPort()}`);
		const { id } = await put();
		for (let i = 1; i < outbox.MOST_ATTEMPTS; i += 1) {
			await expect(sendMail({ outboxId: id })).rejects.toThrow(/ECONNREFUSED/);
			expect(await Outbox.findByPk(id)).toMatchObject({ attempts: i, deadAt: null });
		}
		await expect(sendMail({ outboxId: id })).resolves.toBeUndefined();
		const dead = await Outbox.findByPk(id);
		expect(dead?.deadAt).toBeInstanceOf(Date);
		expect(dead?.lastError).toMatch(/ECONNREFUSED/);
		await sendMail({ outboxId: id });
		expect((await Outbox.findByPk(id))?.attempts).toBe(outbox.MOST_ATTEMPTS);
	});

	it('sends a dead mail again when a PI or admin asks, and only a dead one', async () => {
		const { id } = await put();
		const admin = await makeActor('admin');
		expect((await refusalOf(outbox.retry(admin, id))).code).toBe('not-dead');
		await Outbox.update({ deadAt: new Date(), attempts: 9 }, { where: { id } });
		await outbox.retry(admin, id);
		expect(await jobs(id)).toEqual([{ n: 2 }]);
		await sendMail({ outboxId: id });
		expect((await Outbox.findByPk(id))?.sentAt).toBeInstanceOf(Date);
	});

	it('gives a mail that waits without a job a new one', async () => {
		const { id } = await put();
		await Outbox.update({ createdAt: new Date('2026-01-01') }, { where: { id } });
		expect(await outbox.wakeForgotten()).toBeGreaterThan(0);
		expect(await jobs(id)).toEqual([{ n: 2 }]);
	});

	it('is read by PI and admin alone', async () => {
		for (const role of ['observer', 'experimenter', 'surgeon', 'welfare'] as const) {
			const by = await makeActor(role);
			await expect(outbox.list(by)).rejects.toThrow(Forbidden);
			await expect(outbox.retry(by, (await put()).id)).rejects.toThrow(Forbidden);
		}
		expect((await outbox.list(await makeActor('pi'))).items.length).toBeGreaterThan(0);
	});

	it('shows one-time addresses only while mail is caught on this machine', async () => {
		const { id } = await put();
		const pi = await makeActor('pi');
		const textOf = async () => {
			const { items, isCaughtLocally } = await outbox.list(pi);
			return { isCaughtLocally, text: items.find((mail) => mail.id === id)?.text };
		};
		expect(await textOf()).toMatchObject({ isCaughtLocally: true, text: `Open ${LINK}\n` });
		await useServer('smtp://mail.lab.example');
		const { isCaughtLocally, text } = await textOf();
		expect(isCaughtLocally).toBe(false);
		expect(text).toBe('Open http://localhost:5173/reset/(hidden: only the addressee sees it)\n');
	});

	it('pages by state', async () => {
		const pi = await makeActor('pi');
		const dead = await put();
		await Outbox.update({ deadAt: new Date() }, { where: { id: dead.id } });
		const { items } = await outbox.list(pi, { state: 'dead' });
		expect(items.every((mail) => mail.state === 'dead')).toBe(true);
		expect(items.map((mail) => mail.id)).toContain(dead.id);
	});
});
