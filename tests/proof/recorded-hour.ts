import { runInBrowser } from '../../src/commands/proof/browser';
import type { Report } from '../../src/commands/proof/report';

export const about =
	'An hour of 120 units, 100 MB as CSV: panel within 30 s, server under 400 MiB, other pages answer';

export default async function recordedHour(report: Report): Promise<void> {
	await runInBrowser('recorded-hour.config.ts');
	report.line('All three held; the figures are in the output above.');
}
