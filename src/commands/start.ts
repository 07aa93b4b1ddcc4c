import { join } from 'node:path';
import { ensureBuild, useBuild } from './bundle/ensure-build';
import { runLab } from './lab-run/lab-run';

/** `npm start`: the whole lab, built, on this machine. */
export default function start(): Promise<number> {
	return runLab({
		name: 'start',
		isTalkative: false,
		async prepare() {
			const build = await ensureBuild();
			useBuild(build);
			return {
				command: () => [process.execPath, join(build, 'index.js')],
				env: { NODE_ENV: 'production', QUARTERTURN_BUILD: build }
			};
		}
	});
}
