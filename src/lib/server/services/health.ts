import { connect } from 'node:net';
import { QueryTypes } from 'sequelize';
import { db } from '$lib/server/db';
import { settings } from '$lib/server/settings';
import { storage } from '$lib/server/storage';

export type Part = 'database' | 'storage' | 'queue' | 'mail';
export type Condition = 'ok' | 'failed';
export type Health = { ok: boolean; version: string } & Record<Part, Condition>;
export type Probes = Record<Part, () => Promise<unknown>>;

const TIME_LIMIT_MS = 2000;

/** Mail can wait in the outbox; without the others nothing can be recorded. */
const NEEDED: readonly Part[] = ['database', 'storage', 'queue'];

const probes: Probes = {
	database: () => db().query('SELECT 1', { type: QueryTypes.SELECT }),
	storage: async () => storage().health(),
	queue: () => db().query('SELECT 1 FROM pgboss.queue LIMIT 1', { type: QueryTypes.SELECT }),
	mail: reachMail
};

let running: Promise<Health> | undefined;

/**
 * What the process can reach right now, without saying anything a stranger may not know.
 * Callers that come while a check runs share it, so asking often costs one check at a time.
 */
export async function check(): Promise<Health> {
	running ??= run(probes).finally(() => {
		running = undefined;
	});
	return running;
}

export async function run(asked: Probes, timeLimitMs = TIME_LIMIT_MS): Promise<Health> {
	const [database, storage, queue, mail] = await Promise.all([
		condition(asked.database, timeLimitMs),
		condition(asked.storage, timeLimitMs),
		condition(asked.queue, timeLimitMs),
		condition(asked.mail, timeLimitMs)
	]);
	const parts = { database, storage, queue, mail };
	return {
		ok: NEEDED.every((part) => parts[part] === 'ok'),
		...parts,
		version: settings().version
	};
}

async function condition(probe: () => Promise<unknown>, timeLimitMs: number): Promise<Condition> {
	let timer: NodeJS.Timeout | undefined;
	const late = new Promise<Condition>((resolve) => {
		timer = setTimeout(() => resolve('failed'), timeLimitMs);
	});
	const answer = probe().then(
		(): Condition => 'ok',
		(): Condition => 'failed'
	);
	return Promise.race([answer, late]).finally(() => clearTimeout(timer));
}

/** Without a mail server the local catcher keeps mail in the database, which is probed already. */
async function reachMail(): Promise<void> {
	const { smtpUrl } = settings();
	if (!smtpUrl) return;
	const { hostname, port, protocol } = new URL(smtpUrl);
	await new Promise<void>((resolve, reject) => {
		const socket = connect({
			host: hostname,
			port: Number(port) || (protocol === 'smtps:' ? 465 : 587),
			timeout: TIME_LIMIT_MS
		});
		const refuse = (fault: Error) => {
			socket.destroy();
			reject(fault);
		};
		socket.once('connect', () => {
			socket.end();
			resolve();
		});
		socket.once('timeout', () => refuse(new Error('The mail server did not answer')));
		socket.once('error', refuse);
	});
}
