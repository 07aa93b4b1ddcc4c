import { cpSync, mkdirSync, mkdtempSync, realpathSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { execFileSync, spawn } from 'node:child_process';
import { CHECKOUT } from '../../../src/commands/home/home';
import { findProgram, installPackage } from '../../../src/commands/machine/debian';
import { runProgram } from '../../../src/commands/machine/run-program';
import { machineSettings } from './machine-settings';

/** A program under way in the bare system. */
export interface Running {
	output(): string;
	ended: Promise<number>;
	/** Asks it to end as a service manager would, and waits. */
	stop(): Promise<number>;
}

export interface DebianRoot {
	release: string;
	run(words: string[]): Running;
	remove(): void;
}

/** The checkout's place in the bare system. */
const INSIDE = '/srv/quarterturn';

/** Stops the program when the pipe on standard input closes; all of it in a process namespace of its own. */
const INNER = `exec 3<&0
"$@" </dev/null 3<&- & program=$!
{ read -r _ <&3; kill -TERM $program 2>/dev/null; } & watcher=$!
wait $program; status=$?
kill $watcher 2>/dev/null
exit $status`;

/** A Debian of required packages alone, plus Node.js and a clone of what is committed here. */
export async function makeDebianRoot(): Promise<DebianRoot> {
	if (process.getuid?.() !== 0) throw new Error('debootstrap and chroot need root');
	if (!findProgram('debootstrap')) {
		await installPackage({ name: 'debootstrap', purpose: 'the proof on a bare Debian' });
	}
	const settings = machineSettings();
	const root = mkdtempSync(join(tmpdir(), 'quarterturn-debian-'));
	const made = await runProgram([
		'debootstrap',
		'--variant=minbase',
		settings.release,
		root,
		settings.mirror
	]);
	if (made.code !== 0) throw new Error(`debootstrap failed: ${made.words.split('\n').at(-1)}`);
	execFileSync('chmod', ['0755', root]);
	for (const file of settings.files) copyInto(root, file);
	copyNode(root);
	execFileSync('git', ['clone', '--quiet', `file://${CHECKOUT}`, join(root, INSIDE)]);

	const env = {
		PATH: '/usr/local/sbin:/usr/local/bin:/usr/sbin:/usr/bin:/sbin:/bin',
		HOME: '/root',
		LANG: 'C.UTF-8',
		CI: 'true',
		...settings.env
	};
	return {
		release: settings.release,
		run: (words) => runInside(root, words, env),
		remove: () => rmSync(root, { recursive: true, force: true })
	};
}

function copyInto(root: string, file: string): void {
	mkdirSync(dirname(join(root, file)), { recursive: true });
	cpSync(realpathSync(file), join(root, file), { dereference: true });
}

/** The running Node.js and its npm, as a system-wide install would lay them. */
function copyNode(root: string): void {
	copyInto(root, process.execPath);
	const npm = dirname(dirname(realpathSync(findProgram('npm') ?? 'npm')));
	cpSync(npm, join(root, npm), { recursive: true });
	for (const name of ['npm', 'npx']) {
		const link = join(root, dirname(process.execPath), name);
		execFileSync('ln', ['-sf', join(npm, 'bin', `${name}-cli.js`), link]);
	}
}

function runInside(root: string, words: string[], env: Record<string, string>): Running {
	// Mounts and processes live in namespaces of their own and are gone with them.
	const outer = `mount -t tmpfs tmpfs "$1/dev/shm" && cd / && root=$1 && shift && exec chroot "$root" /bin/sh -c 'cd ${INSIDE}; inner=$1; shift; exec /bin/sh -c "$inner" sh "$@"' sh "$@"`;
	const child = spawn(
		'unshare',
		[
			...['--mount', '--pid', '--fork', '--kill-child', `--mount-proc=${join(root, 'proc')}`],
			...['/bin/sh', '-c', outer, 'sh', root, INNER, ...words]
		],
		{ env, stdio: ['pipe', 'pipe', 'pipe'] }
	);
	child.stdin.on('error', () => undefined);
	let output = '';
	const keep = (chunk: Buffer) => (output += chunk);
	child.stdout.on('data', keep);
	child.stderr.on('data', keep);
	const ended = new Promise<number>((resolve, reject) => {
		child.once('error', reject);
		child.once('close', (code) => resolve(code ?? 1));
	});
	return {
		output: () => output,
		ended,
		stop: () => {
			child.stdin.end();
			return ended;
		}
	};
}
