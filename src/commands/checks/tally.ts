import { existsSync, readFileSync } from 'node:fs';
import type { Count } from './steps';

export interface Tally {
	passed: number;
	failed: number;
	skipped: number;
}

/** The parts of the two runners' JSON reports that are read here. */
interface VitestReport {
	numPassedTests: number;
	numFailedTests: number;
	numPendingTests: number;
	numTodoTests: number;
}
interface PlaywrightReport {
	stats: { expected: number; unexpected: number; flaky: number; skipped: number };
}

/**
 * What a step counts for. A step that failed counts at least one failure, whatever its report
 * says: a runner that cannot start has no failed test to show.
 */
export function tally(count: Count, reportFile: string, isGood: boolean): Tally {
	const found = count === 'one' ? undefined : read(count, reportFile);
	if (!found) return { passed: isGood ? 1 : 0, failed: isGood ? 0 : 1, skipped: 0 };
	return isGood || found.failed > 0 ? found : { ...found, failed: 1 };
}

function read(count: 'vitest' | 'playwright', file: string): Tally | undefined {
	if (!existsSync(file)) return undefined;
	const report: unknown = JSON.parse(readFileSync(file, 'utf8'));
	if (count === 'vitest') {
		const { numPassedTests, numFailedTests, numPendingTests, numTodoTests } =
			report as VitestReport;
		return {
			passed: numPassedTests,
			failed: numFailedTests,
			skipped: numPendingTests + numTodoTests
		};
	}
	const { expected, unexpected, flaky, skipped } = (report as PlaywrightReport).stats;
	return { passed: expected + flaky, failed: unexpected, skipped };
}

export function add(tallies: Tally[]): Tally {
	return tallies.reduce(
		(sum, { passed, failed, skipped }) => ({
			passed: sum.passed + passed,
			failed: sum.failed + failed,
			skipped: sum.skipped + skipped
		}),
		{ passed: 0, failed: 0, skipped: 0 }
	);
}

/** The line that tools which watch a test run look for. */
export function closingLine({ passed, failed, skipped }: Tally): string {
	return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
