import { startBound } from './bound-process';

const KEPT_CHARACTERS = 20_000;

export interface RunOptions {
	cwd?: string;
	env?: NodeJS.ProcessEnv;
	uid?: number;
	gid?: number;
}

/** Runs a program to its end and keeps what it said; it does not outlive this process. */
export async function runProgram(
	command: string[],
	options: RunOptions = {}
): Promise<{ code: number; words: string }> {
	const { child, ended } = startBound(command, {
		...options,
		stopSignal: 'TERM',
		patienceMs: 5_000,
		stdout: 'pipe',
		stderr: 'pipe'
	});
	let words = '';
	const keep = (chunk: Buffer) => (words = (words + chunk.toString()).slice(-KEPT_CHARACTERS));
	child.stdout?.on('data', keep);
	child.stderr?.on('data', keep);
	const closed = new Promise((resolve) => child.once('close', resolve));
	const code = await ended;
	await closed;
	return { code, words: words.trim() };
}
