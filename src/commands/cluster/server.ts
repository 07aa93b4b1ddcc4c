import {
	closeSync,
	existsSync,
	fstatSync,
	openSync,
	readFileSync,
	renameSync,
	statSync
} from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';
import { Refusal } from '../bootstrap/refusal.mjs';
import { startBound, type BoundProcess } from '../machine/bound-process';
import { anyFreePort, isPortFree } from '../machine/ports';
import { dataFolder } from './data-folder';
import { clearOldServer, readPostmasterNote } from './postmaster';
import type { ServerUser } from './server-user';

const LOG_LIMIT_BYTES = 10 * 1024 * 1024;
const START_PATIENCE_MS = 120_000;

export interface ServerOptions {
	program: string;
	place: string;
	user: ServerUser | undefined;
	/** The port of the last run; another is taken when it is in use now. */
	port: number | undefined;
	logFile: string;
	/** Gives up safety on a power cut for speed; for clusters that are deleted afterwards. */
	isThrowAway: boolean;
}

export interface RunningServer {
	port: number;
	process: BoundProcess;
}

/** Starts the server on loopback and answers when it takes connections. */
export async function startServer(options: ServerOptions): Promise<RunningServer> {
	rotate(options.logFile);
	for (let attempt = 1; ; attempt++) {
		await clearOldServer(dataFolder(options.place));
		const port =
			options.port && attempt < 3 && (await isPortFree(options.port, ['127.0.0.1']))
				? options.port
				: await anyFreePort();
		const log = openSync(options.logFile, 'a', 0o600);
		const from = fstatSync(log).size;
		const bound = launch(options, port, log);
		closeSync(log);
		if (await isReady(bound, options.place)) return { port, process: bound };

		const words = readFileSync(options.logFile).subarray(from).toString();
		// Backends of a killed server may outlive it for a moment, and a port can be lost in a race.
		const mayPass = /shared memory block|lock file .* already exists|could not bind/.test(words);
		if (!mayPass || attempt === 5) {
			throw new Refusal(
				`The database server did not start. Its data in ${options.place} were left as they are. What it said last:\n\n${words.trim().split('\n').slice(-8).join('\n')}\n\nThe whole of it is in ${options.logFile}.`
			);
		}
		await sleep(1_000);
	}
}

function launch(options: ServerOptions, port: number, log: number): BoundProcess {
	const settings: Record<string, string> = {
		listen_addresses: '127.0.0.1',
		port: String(port),
		unix_socket_directories: '',
		log_checkpoints: 'off',
		timezone: 'UTC',
		log_timezone: 'UTC',
		...(options.isThrowAway
			? { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' }
			: {})
	};
	const flags = Object.entries(settings).flatMap(([name, value]) => ['-c', `${name}=${value}`]);
	return startBound([options.program, '-D', dataFolder(options.place), ...flags], {
		...options.user,
		// INT is PostgreSQL's fast shutdown: open transactions are rolled back, files are left clean.
		stopSignal: 'INT',
		patienceMs: 60_000,
		cwd: options.place,
		env: { PATH: process.env.PATH, LANG: 'C.UTF-8' },
		stdout: log,
		stderr: log
	});
}

async function isReady(bound: BoundProcess, place: string): Promise<boolean> {
	let hasEnded = false;
	void bound.ended.catch(() => 1).then(() => (hasEnded = true));
	const until = Date.now() + START_PATIENCE_MS;
	while (!hasEnded) {
		// A note older than this start cannot be here: it was cleared before.
		if (readPostmasterNote(dataFolder(place))?.isReady) return true;
		if (Date.now() > until) {
			await bound.stop();
			return false;
		}
		await sleep(25);
	}
	return false;
}

function rotate(file: string): void {
	if (existsSync(file) && statSync(file).size > LOG_LIMIT_BYTES) renameSync(file, `${file}.1`);
}
