import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { holderOf, processStart, tryLock } from './lock.mjs';

let folder: string;
let file: string;

beforeEach(() => {
	folder = mkdtempSync(join(tmpdir(), 'lock-'));
	file = join(folder, 'running.json');
});
afterEach(() => rmSync(folder, { recursive: true }));

function take() {
	const lock = tryLock(file, { address: 'http://localhost:1' });
	if ('holder' in lock) throw new Error('expected to get the lock');
	return lock;
}

describe('tryLock', () => {
	it('gives the lock to the first and names that holder to the second', () => {
		take();
		const second = tryLock(file);
		expect('holder' in second && second.holder.pid).toBe(process.pid);
		expect('holder' in second && second.holder.note.address).toBe('http://localhost:1');
	});

	it('lets the next one in after release and leaves nothing behind', () => {
		take().release();
		expect(readdirSync(folder)).toEqual([]);
		take();
	});

	it('shows others what the holder adds later', () => {
		take().update({ address: 'http://localhost:2' });
		expect(holderOf(file)?.note).toEqual({ address: 'http://localhost:2' });
	});

	it('takes over from a process that no longer exists', () => {
		writeFileSync(file, JSON.stringify({ pid: 2 ** 22 + 1, startedAt: '1', note: {} }));
		take();
		expect(JSON.parse(readFileSync(file, 'utf8')).pid).toBe(process.pid);
	});

	it('takes over when the process id now belongs to a program that began at another time', () => {
		writeFileSync(file, JSON.stringify({ pid: process.ppid, startedAt: 'earlier', note: {} }));
		take();
	});

	it('takes over a half-written lock file', () => {
		writeFileSync(file, '{"pid": 1');
		take();
	});

	it('does not remove a lock that another process has taken over meanwhile', () => {
		const lock = take();
		const other = { pid: process.ppid, startedAt: processStart(process.ppid), note: {} };
		writeFileSync(file, JSON.stringify(other));
		lock.release();
		expect(existsSync(file)).toBe(true);
	});
});

describe('processStart', () => {
	it('is steady for a living process and undefined for none', () => {
		expect(processStart(process.pid)).toBe(processStart(process.pid));
		expect(processStart(process.pid)).toBeTruthy();
		expect(processStart(2 ** 22 + 1)).toBeUndefined();
	});
});
