import { linkSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { execFileSync } from 'node:child_process';
import process from 'node:process';

/**
 * A lock file that names its holder. A holder counts as alive only when both its
 * process id and that process's start time match, so an id that the system has
 * handed to another program since does not keep the lock.
 *
 * @typedef {{ pid: number, startedAt: string, note: Record<string, string> }} Holder
 */

/**
 * When the process began, in whatever unit the system gives; undefined when it is gone.
 * @param {number} pid
 * @returns {string | undefined}
 */
export function processStart(pid) {
	try {
		const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
		// The name in brackets may hold blanks and brackets itself; the rest follows the last one.
		const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
		const [state] = fields;
		return state === 'Z' || state === 'X' ? undefined : fields[19];
	} catch {
		return process.platform === 'linux' ? undefined : startFromPs(pid);
	}
}

/** @param {number} pid */
function startFromPs(pid) {
	try {
		const out = execFileSync('ps', ['-o', 'lstart=', '-p', String(pid)], { encoding: 'utf8' });
		return out.trim() || undefined;
	} catch {
		return undefined;
	}
}

/**
 * @param {string} file
 * @returns {Holder | undefined} the living holder, if there is one
 */
export function holderOf(file) {
	const holder = read(file);
	return holder && processStart(holder.pid) === holder.startedAt ? holder : undefined;
}

/**
 * @param {string} file
 * @returns {Holder | undefined}
 */
function read(file) {
	try {
		return JSON.parse(readFileSync(file, 'utf8'));
	} catch {
		return undefined;
	}
}

/**
 * Takes the lock, or tells who has it.
 *
 * @param {string} file
 * @param {Record<string, string>} [note] what others may read about the holder
 * @returns {{ holder: Holder } | { release: () => void, update: (note: Record<string, string>) => void }}
 */
export function tryLock(file, note = {}) {
	const own = `${file}.${process.pid}`;
	const startedAt = processStart(process.pid) ?? '';
	/** @param {Record<string, string>} content */
	const write = (content) =>
		writeFileSync(own, JSON.stringify({ pid: process.pid, startedAt, note: content }));

	write(note);
	try {
		if (!claim(own, file)) return { holder: holderOf(file) ?? unknown() };
	} finally {
		rmSync(own, { force: true });
	}
	return {
		release: () => {
			if (read(file)?.pid === process.pid) rmSync(file, { force: true });
		},
		update: (content) => {
			write(content);
			renameSync(own, file);
		}
	};
}

/** @returns {Holder} */
function unknown() {
	return { pid: 0, startedAt: '', note: {} };
}

/**
 * A hard link is made or refused in one step, so of two claimants one wins.
 * @param {string} own
 * @param {string} file
 */
function claim(own, file) {
	for (let attempt = 0; attempt < 3; attempt++) {
		try {
			linkSync(own, file);
			return true;
		} catch (error) {
			if (!isExists(error)) throw error;
		}
		if (holderOf(file) || !removeStale(file)) return false;
	}
	return false;
}

/**
 * Clears a lock whose holder is gone, one process at a time: two that both saw the
 * stale file must not remove the fresh one that the faster of them has put there.
 * @param {string} file
 */
function removeStale(file) {
	const guard = `${file}.clearing`;
	try {
		writeFileSync(guard, String(process.pid), { flag: 'wx' });
	} catch (error) {
		if (!isExists(error)) throw error;
		const isAbandoned =
			Date.now() - (statSync(guard, { throwIfNoEntry: false })?.mtimeMs ?? 0) > 10_000;
		if (isAbandoned) rmSync(guard, { force: true });
		return isAbandoned;
	}
	try {
		if (!holderOf(file)) rmSync(file, { force: true });
		return true;
	} finally {
		rmSync(guard, { force: true });
	}
}

/** @param {unknown} error */
function isExists(error) {
	return error instanceof Error && 'code' in error && error.code === 'EEXIST';
}
