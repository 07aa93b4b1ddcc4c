import { join } from 'node:path';
import { CHECKOUT } from '../home/home';
import { startBound } from '../machine/bound-process';

/**
 * Runs the browser tests of one configuration of tests/e2e, on a lab of their own.
 * @throws Error when one fails
 */
export async function runInBrowser(config: string): Promise<void> {
	const words = ['test', '--config', `tests/e2e/${config}`];
	const run = startBound([join(CHECKOUT, 'node_modules/.bin/playwright'), ...words], {
		stopSignal: 'TERM',
		patienceMs: 30_000,
		cwd: CHECKOUT,
		stdout: 1,
		stderr: 2
	});
	const code = await run.ended;
	if (code !== 0) throw new Error(`The browser tests of ${config} ended with exit ${code}.`);
}
