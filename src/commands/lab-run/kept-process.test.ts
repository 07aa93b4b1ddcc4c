import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { keepRunning } from './kept-process';

let folder: string;
beforeEach(() => {
	folder = mkdtempSync(join(tmpdir(), 'kept-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

function keep(script: string) {
	return keepRunning({
		name: 'trial',
		command: ['/bin/sh', '-c', script],
		env: process.env,
		cwd: folder,
		logFile: join(folder, 'trial.log'),
		isTalkative: false
	});
}

async function logHas(lines: number): Promise<string[]> {
	for (let i = 0; i < 100; i++) {
		try {
			const found = readFileSync(join(folder, 'trial.log'), 'utf8').trim().split('\n');
			if (found.length >= lines) return found;
		} catch {
			// Not written yet.
		}
		await sleep(50);
	}
	throw new Error(`the log never had ${lines} lines`);
}

const UNTIL_STOPPED = 'echo up; trap "echo down; exit 0" TERM; while :; do sleep 0.05; done';

describe('keepRunning', () => {
	it('starts a program again when it dies, and stops it for good when told to', async () => {
		const kept = keep('echo up; test -e again && exec sleep 60; : > again; exit 3');
		await logHas(2);
		await kept.stop();
		await sleep(300);
		expect((await logHas(2)).length).toBe(2);
	});

	it('restarts in good order on request and goes on keeping it', async () => {
		const kept = keep(UNTIL_STOPPED);
		await logHas(1);
		await kept.restart();
		expect((await logHas(3)).slice(0, 3)).toEqual(['up', 'down', 'up']);
		await kept.stop();
		expect((await logHas(4)).at(-1)).toBe('down');
	});

	it('gives up on a program that dies at once every time, with its last words', async () => {
		const kept = keep('echo cannot read settings >&2; exit 1');
		await expect(kept.failed).rejects.toThrow(/keeps ending[^]*cannot read settings/);
	});
});
