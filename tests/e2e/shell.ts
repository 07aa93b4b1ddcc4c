import { execFile } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';

const checkout = fileURLToPath(new URL('../..', import.meta.url));

/** Runs a program in the checkout, as from a shell. @returns what it printed */
export async function run(words: string[], env: NodeJS.ProcessEnv = {}): Promise<string> {
	const [program, ...args] = words;
	const { stdout } = await promisify(execFile)(program, args, {
		cwd: checkout,
		env: { ...process.env, ...env },
		maxBuffer: 64 * 1024 * 1024
	});
	return stdout;
}

/** The words that start a command of the project. */
export const command = (...words: string[]) => [process.execPath, 'src/commands/run.mjs', ...words];

/** A token of the demo lab's experimenter, made as on the machine itself. */
export async function makeToken(scope: 'read' | 'write'): Promise<string> {
	const who = ['--email', 'experimenter@example.org', '--scope', scope, '--days', '1'];
	const env = { QUARTERTURN_HOME: process.env.E2E_HOME };
	return (await run(command('lab', 'token', 'create', ...who), env)).trim();
}
