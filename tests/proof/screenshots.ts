import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { CHECKOUT } from '../../src/commands/home/home';
import { startBound } from '../../src/commands/machine/bound-process';
import type { Report } from '../../src/commands/proof/report';

export const about =
	'Every page in three themes at 390, 1024 and 1600 px, without sideways scrolling';

export default async function screenshots(report: Report): Promise<void> {
	const words = ['test', '--config', 'tests/e2e/pictures.config.ts'];
	const run = startBound([join(CHECKOUT, 'node_modules/.bin/playwright'), ...words], {
		stopSignal: 'TERM',
		patienceMs: 30_000,
		cwd: CHECKOUT,
		stdout: 1,
		stderr: 2
	});
	const code = await run.ended;
	const folder = 'tests/reports/screenshots';
	const pictures = readdirSync(join(CHECKOUT, folder)).length;
	report.line(`${pictures} pictures in ${folder}; they are for looking at.`);
	if (code !== 0) throw new Error(`Taking the pictures ended with exit ${code}.`);
}
