import { join } from 'node:path';
import { createTransport, type Transporter } from 'nodemailer';
import { settings } from '$lib/server/settings';
import { openCatcher, type Catcher } from './catcher';

interface Line {
	transporter: Transporter;
	catcher: Catcher | null;
}

let line: Promise<Line> | undefined;

const TIMEOUTS = { connectionTimeout: 20_000, greetingTimeout: 20_000, socketTimeout: 40_000 };

async function open(): Promise<Line> {
	const { smtpUrl, home } = settings();
	if (smtpUrl) {
		return { transporter: createTransport({ url: smtpUrl, ...TIMEOUTS }), catcher: null };
	}
	const catcher = await openCatcher(join(home, 'mail'));
	const transporter = createTransport({
		host: '127.0.0.1',
		port: catcher.port,
		secure: false,
		ignoreTLS: true,
		...TIMEOUTS
	});
	return { transporter, catcher };
}

/** The way out for mail: the lab's server, else the local catcher, opened at first use. */
export async function transport(): Promise<Transporter> {
	line ??= open();
	try {
		return (await line).transporter;
	} catch (fault) {
		// The next mail tries again; a catcher that could not open once is not shut for good.
		line = undefined;
		throw fault;
	}
}

export async function closeTransport(): Promise<void> {
	const opened = line;
	line = undefined;
	if (!opened) return;
	const { transporter, catcher } = await opened;
	transporter.close();
	await catcher?.close();
}
