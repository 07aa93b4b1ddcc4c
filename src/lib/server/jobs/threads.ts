import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { MessageChannel, type Transferable } from 'node:worker_threads';
import { Piscina } from 'piscina';
import { settings } from '$lib/server/settings';
import type { TaskInput, TaskName, TaskOutput } from './tasks/tasks';

const kept = globalThis as typeof globalThis & { quarterturnThreads?: Piscina };

/** An idle pool gives its threads back after this long. */
const IDLE_MS = 60_000;

/**
 * Where the thread's code is. From source it is the file beside this one, read through tsx; in a
 * build this module lies in some chunk below the folder that holds `threads/thread.js`.
 */
function entry(): { filename: string; execArgv: string[] } {
	const here = fileURLToPath(import.meta.url);
	if (here.endsWith('.ts')) {
		return { filename: join(dirname(here), 'thread.ts'), execArgv: ['--import', 'tsx'] };
	}
	for (let folder = dirname(here); folder !== dirname(folder); folder = dirname(folder)) {
		const filename = join(folder, 'threads/thread.js');
		if (existsSync(filename)) return { filename, execArgv: [] };
	}
	throw new Error('The threads of this build are missing. Build again with `npm run build`.');
}

function pool(): Piscina {
	if (!kept.quarterturnThreads) {
		const { filename, execArgv } = entry();
		kept.quarterturnThreads = new Piscina({
			filename,
			execArgv,
			minThreads: 0,
			maxThreads: settings().workers,
			idleTimeout: IDLE_MS,
			env: { ...process.env, TSX_TSCONFIG_PATH: process.env.TSX_TSCONFIG_PATH ?? 'tsconfig.json' }
		});
	}
	return kept.quarterturnThreads;
}

interface ThreadOptions {
	/** Ends the thread when aborted; the promise then rejects. */
	signal?: AbortSignal;
	/** Share of the work done, 0 to 1. */
	onProgress?: (share: number) => void;
	/** Buffers handed over instead of copied; the caller may not use them afterwards. */
	transfer?: Transferable[];
}

/**
 * Does work of more than a few milliseconds in a thread of this process, so that requests are
 * answered meanwhile.
 */
export async function inThread<T extends TaskName>(
	task: T,
	input: TaskInput<T>,
	{ signal, onProgress, transfer = [] }: ThreadOptions = {}
): Promise<TaskOutput<T>> {
	const { port1: near, port2: far } = new MessageChannel();
	near.on('message', (share: number) => onProgress?.(share));
	// A waiting port must not keep a stopping process alive.
	near.unref();
	try {
		return await pool().run(
			{ task, input, progress: far },
			{ signal, transferList: [far, ...transfer] }
		);
	} finally {
		near.close();
	}
}

export async function closeThreads(): Promise<void> {
	const open = kept.quarterturnThreads;
	kept.quarterturnThreads = undefined;
	await open?.destroy();
}
