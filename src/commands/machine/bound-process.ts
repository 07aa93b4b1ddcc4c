import { spawn, type ChildProcess } from 'node:child_process';
import { Writable } from 'node:stream';

/**
 * Runs the program while a pipe from us stays open. However our process ends, kill -9
 * included, the system closes the pipe, the shell's reader wakes and stops the program.
 * `wait` hands the program's own exit status on when it ends by itself; the shell's own
 * remark that its child was stopped is dropped.
 */
const WATCH = `exec 3<&0
signal=$1; shift
"$@" </dev/null 3<&- & program=$!
{ read -r _ <&3; kill -s "$signal" $program 2>/dev/null; } & watcher=$!
exec 3<&- 2>/dev/null
wait $program; status=$?
kill $watcher 2>/dev/null
exit $status`;

export interface BoundOptions {
	/** Asks the program to end in good order. */
	stopSignal: 'INT' | 'TERM';
	cwd?: string;
	env?: NodeJS.ProcessEnv;
	uid?: number;
	gid?: number;
	stdout: 'pipe' | 'ignore' | number;
	stderr: 'pipe' | 'ignore' | number;
	/** How long a stop may take before the program is killed. */
	patienceMs: number;
}

export interface BoundProcess {
	child: ChildProcess;
	/** Settles with the exit code when the program has ended, for whatever reason. */
	ended: Promise<number>;
	stop(): Promise<void>;
	kill(): void;
}

export function startBound(command: string[], options: BoundOptions): BoundProcess {
	const { stopSignal, patienceMs, stdout, stderr, ...rest } = options;
	// A session of its own: Ctrl-C in the terminal reaches only us, and we stop things in order.
	const child = spawn('/bin/sh', ['-c', WATCH, 'sh', stopSignal, ...command], {
		...rest,
		detached: true,
		stdio: ['pipe', stdout, stderr]
	});
	// The reader may go first; writing to it then is no fault of ours.
	child.stdin?.on('error', () => undefined);
	const ended = new Promise<number>((resolve, reject) => {
		child.once('error', reject);
		child.once('exit', (code, signal) => resolve(code ?? (signal ? 128 : 0)));
	});
	ended.catch(() => undefined);
	const kill = () => {
		try {
			if (child.pid) process.kill(-child.pid, 'SIGKILL');
		} catch (error) {
			if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
		}
	};
	return {
		child,
		ended,
		kill,
		async stop() {
			if (child.stdin instanceof Writable) child.stdin.end();
			const timer = setTimeout(kill, patienceMs);
			await ended.catch(() => undefined);
			clearTimeout(timer);
		}
	};
}
