import { createWriteStream, existsSync, renameSync, statSync, type WriteStream } from 'node:fs';
import { createInterface } from 'node:readline';
import { setTimeout as sleep } from 'node:timers/promises';
import { Refusal } from '../bootstrap/refusal.mjs';
import { startBound, type BoundProcess } from '../machine/bound-process';
import { say } from '../machine/say';

const LOG_LIMIT_BYTES = 10 * 1024 * 1024;
/** So many ends within the window are no accident, and starting again would not help. */
const MOST_ENDS = 5;
const WINDOW_MS = 60_000;
const KEPT_LINES = 12;

export interface KeptOptions {
	name: string;
	command: string[];
	env: NodeJS.ProcessEnv;
	cwd: string;
	logFile: string;
	/** Shows standard output too, for a person who develops. */
	isTalkative: boolean;
}

export interface KeptProcess {
	/** Rejects when the program keeps ending; never settles otherwise. */
	failed: Promise<never>;
	stop(): Promise<void>;
	kill(): void;
	/** Ends it in good order and starts it anew. */
	restart(): Promise<void>;
}

/** Keeps a program running: it is started again when it ends, until told to stop. */
export function keepRunning(options: KeptOptions): KeptProcess {
	const log = openLog(options.logFile);
	const lastLines: string[] = [];
	const ends: number[] = [];
	let isStopping = false;
	let replacing: Promise<void> | undefined;
	let bound = launch();

	function launch(): BoundProcess {
		const started = startBound(options.command, {
			stopSignal: 'TERM',
			patienceMs: 15_000,
			cwd: options.cwd,
			env: options.env,
			stdout: 'pipe',
			stderr: 'pipe'
		});
		const listen = (stream: NodeJS.ReadableStream | null, isShown: boolean) => {
			if (!stream) return;
			createInterface({ input: stream }).on('line', (line) => {
				log.write(`${line}\n`);
				lastLines.push(line);
				if (lastLines.length > KEPT_LINES) lastLines.shift();
				if (isShown) say(`${options.name}: ${line}`);
			});
		};
		listen(started.child.stdout, options.isTalkative);
		listen(started.child.stderr, true);
		return started;
	}

	async function watch(): Promise<never> {
		for (;;) {
			const current = bound;
			const code = await current.ended;
			if (isStopping) return new Promise<never>(() => undefined);
			if (replacing) {
				await replacing;
				continue;
			}
			const now = Date.now();
			ends.push(now);
			while (ends[0] < now - WINDOW_MS) ends.shift();
			if (ends.length >= MOST_ENDS) {
				throw new Refusal(
					`The ${options.name} process keeps ending (exit ${code}). The records are safe. Its last words:\n\n${lastLines.join('\n')}\n\nMore in ${options.logFile}.`
				);
			}
			say(`The ${options.name} process ended (exit ${code}); starting it again.`);
			await sleep(250 * 2 ** (ends.length - 1));
			if (!isStopping) bound = launch();
		}
	}

	const failed = watch();
	failed.catch(() => undefined);
	return {
		failed,
		kill: () => bound.kill(),
		async stop() {
			isStopping = true;
			await bound.stop();
			log.end();
		},
		async restart() {
			replacing ??= (async () => {
				await bound.stop();
				bound = launch();
				replacing = undefined;
			})();
			await replacing;
		}
	};
}

function openLog(file: string): WriteStream {
	if (existsSync(file) && statSync(file).size > LOG_LIMIT_BYTES) renameSync(file, `${file}.1`);
	return createWriteStream(file, { flags: 'a', mode: 0o600 });
}
