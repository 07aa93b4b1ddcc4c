import { watch } from 'node:fs';
import { join } from 'node:path';
import { CHECKOUT } from './home/home';
import { runLab } from './lab-run/lab-run';

/** What the worker runs; pages reload by themselves. */
const WORKER_SOURCES = ['src/lib/server', 'src/lib/analysis', 'src/lib/schemas'];
const SETTLE_MS = 300;

/** `npm run dev`: the whole lab with hot reload. */
export default function dev(): Promise<number> {
	return runLab({
		name: 'dev',
		isTalkative: true,
		async prepare() {
			return {
				command: ({ port, host }) => [
					process.execPath,
					'node_modules/vite/bin/vite.js',
					'dev',
					...['--port', String(port), '--strictPort', '--host', host]
				],
				env: { NODE_ENV: 'development' }
			};
		},
		watch(worker) {
			let timer: NodeJS.Timeout | undefined;
			const onChange = (_event: string, file: string | null) => {
				if (!file?.endsWith('.ts') || file.endsWith('.test.ts')) return;
				clearTimeout(timer);
				timer = setTimeout(() => void worker.restart(), SETTLE_MS);
			};
			const watchers = WORKER_SOURCES.map((folder) =>
				watch(join(CHECKOUT, folder), { recursive: true }, onChange)
			);
			return () => {
				clearTimeout(timer);
				for (const watcher of watchers) watcher.close();
			};
		}
	});
}
