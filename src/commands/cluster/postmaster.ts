import { readFileSync, readlinkSync, rmSync } from 'node:fs';
import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

/** PostgreSQL's own note of its running server, `postmaster.pid`. */
export interface PostmasterNote {
	pid: number;
	port: number;
	/** True from the moment the server takes connections. */
	isReady: boolean;
}

/** The file's lines are fixed: 1 process id, 4 port, 8 status. */
export function parsePostmasterNote(text: string): PostmasterNote | undefined {
	const lines = text.split('\n').map((line) => line.trim());
	const pid = Number(lines[0]);
	if (!Number.isInteger(pid) || pid <= 0) return undefined;
	return { pid, port: Number(lines[3]) || 0, isReady: lines[7] === 'ready' };
}

export function readPostmasterNote(dataFolder: string): PostmasterNote | undefined {
	try {
		return parsePostmasterNote(readFileSync(join(dataFolder, 'postmaster.pid'), 'utf8'));
	} catch {
		return undefined;
	}
}

export type NoteVerdict = 'none' | 'stale' | 'running';

/**
 * PostgreSQL refuses to start while the noted id belongs to any process of its user. After a
 * crash or a reboot that can be some other program, which we tell from its command line.
 *
 * @param commandOf the words a process was started with; undefined when there is no such process
 */
export function judgeNote(
	note: PostmasterNote | undefined,
	dataFolder: string,
	commandOf: (pid: number) => string | undefined
): NoteVerdict {
	if (!note) return 'none';
	const command = commandOf(note.pid);
	if (!command) return 'stale';
	return /postgres|postmaster/.test(command) && command.includes(dataFolder) ? 'running' : 'stale';
}

export function commandOfProcess(pid: number): string | undefined {
	try {
		const words = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').join(' ').trim();
		return words || readlinkSync(`/proc/${pid}/exe`);
	} catch {
		if (process.platform === 'linux') return undefined;
	}
	try {
		return execFileSync('ps', ['-o', 'command=', '-p', String(pid)], { encoding: 'utf8' }).trim();
	} catch {
		return undefined;
	}
}

/**
 * Clears the way for a new server: an old one still shutting down is waited for, one whose
 * starter was killed is asked to stop, and a note that speaks of another program is removed.
 * Called under the home's lock, so no living start of ours owns what is found.
 */
export async function clearOldServer(dataFolder: string, patienceMs = 30_000): Promise<void> {
	const until = Date.now() + patienceMs;
	let asked = 0;
	for (;;) {
		const note = readPostmasterNote(dataFolder);
		const verdict = judgeNote(note, dataFolder, commandOfProcess);
		if (verdict === 'none' || !note) return;
		if (verdict === 'stale') {
			rmSync(join(dataFolder, 'postmaster.pid'), { force: true });
			return;
		}
		if (Date.now() > until) {
			throw new Error(
				`An earlier database server (process ${note.pid}) on ${dataFolder} does not stop`
			);
		}
		if (asked++ % 50 === 20) process.kill(note.pid, 'SIGINT');
		await sleep(100);
	}
}
