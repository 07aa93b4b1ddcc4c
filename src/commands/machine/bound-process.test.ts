import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { processStart } from '../bootstrap/lock.mjs';
import { startBound } from './bound-process';

const folder = mkdtempSync(join(tmpdir(), 'bound-'));
afterAll(() => rmSync(folder, { recursive: true }));

const quiet = { stopSignal: 'TERM', stdout: 'ignore', stderr: 'ignore' } as const;

/** A program that notes its id and whether it was asked to end in good order. */
function program(name: string, onTerm: string): { command: string[]; note: string } {
	const note = join(folder, name);
	const script = `echo $$ > ${note}; trap '${onTerm}' TERM; while :; do sleep 0.05; done`;
	return { command: ['/bin/sh', '-c', script], note };
}

async function contentOf(file: string, wanted: RegExp): Promise<string> {
	for (let i = 0; i < 100; i++) {
		try {
			const text = readFileSync(file, 'utf8');
			if (wanted.test(text)) return text;
		} catch {
			// Not written yet.
		}
		await sleep(50);
	}
	throw new Error(`${file} never held ${wanted}`);
}

describe('startBound', () => {
	it("hands on the program's exit status", async () => {
		const bound = startBound(['/bin/sh', '-c', 'exit 7'], { ...quiet, patienceMs: 1_000 });
		expect(await bound.ended).toBe(7);
	});

	it('asks the program to end and waits for it', async () => {
		const { command, note } = program('polite', `echo bye >> ${join(folder, 'polite')}; exit 0`);
		const bound = startBound(command, { ...quiet, patienceMs: 5_000 });
		await contentOf(note, /\d+\n/);
		await bound.stop();
		expect(readFileSync(note, 'utf8')).toContain('bye');
	});

	it('kills a program that does not listen', async () => {
		const { command, note } = program('deaf', ':');
		const bound = startBound(command, { ...quiet, patienceMs: 200 });
		const pid = Number(await contentOf(note, /\d+\n/));
		await bound.stop();
		await sleep(50);
		expect(processStart(pid)).toBeUndefined();
	});

	it('stops the program when its starter is killed outright', async () => {
		const { command, note } = program('orphan', `echo bye >> ${join(folder, 'orphan')}; exit 0`);
		const module = fileURLToPath(new URL('bound-process.ts', import.meta.url));
		const script = `import { startBound } from ${JSON.stringify(module)};
			startBound(${JSON.stringify(command)}, { stopSignal: 'TERM', stdout: 'ignore', stderr: 'ignore', patienceMs: 1000 });
			setInterval(() => {}, 1000);`;
		const starter = spawn(process.execPath, [
			'--import',
			'tsx',
			'--input-type=module',
			'-e',
			script
		]);
		await contentOf(note, /\d+\n/);
		starter.kill('SIGKILL');
		await once(starter, 'exit');
		expect(await contentOf(note, /bye/)).toContain('bye');
	});
});
