import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { CHECKOUT } from '../../src/commands/home/home';
import { runInBrowser } from '../../src/commands/proof/browser';
import type { Report } from '../../src/commands/proof/report';

export const about =
	'Every page in three themes at 390, 1024 and 1600 px, without sideways scrolling';

export default async function screenshots(report: Report): Promise<void> {
	await runInBrowser('pictures.config.ts');
	const folder = 'tests/reports/screenshots';
	const pictures = readdirSync(join(CHECKOUT, folder)).length;
	report.line(`${pictures} pictures in ${folder}; they are for looking at.`);
}
