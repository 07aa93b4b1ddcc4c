import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { add, closingLine, tally } from './tally';

let folder: string;
let file: string;
beforeEach(() => {
	folder = mkdtempSync(join(tmpdir(), 'tally-'));
	file = join(folder, 'report.json');
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('tally', () => {
	it('counts a step without tests as one', () => {
		expect(tally('one', file, true)).toEqual({ passed: 1, failed: 0, skipped: 0 });
		expect(tally('one', file, false)).toEqual({ passed: 0, failed: 1, skipped: 0 });
	});

	it('reads what the unit runner reports', () => {
		const report = { numPassedTests: 7, numFailedTests: 2, numPendingTests: 1, numTodoTests: 1 };
		writeFileSync(file, JSON.stringify(report));
		expect(tally('vitest', file, false)).toEqual({ passed: 7, failed: 2, skipped: 2 });
	});

	it('reads what the browser runner reports; a test that passed on its second try passed', () => {
		const stats = { expected: 5, unexpected: 1, flaky: 1, skipped: 2 };
		writeFileSync(file, JSON.stringify({ stats }));
		expect(tally('playwright', file, false)).toEqual({ passed: 6, failed: 1, skipped: 2 });
	});

	it('never hides the failure of a runner whose report shows no failed test', () => {
		expect(tally('vitest', file, false).failed).toBe(1);
		writeFileSync(
			file,
			JSON.stringify({ numPassedTests: 3, numFailedTests: 0, numPendingTests: 0, numTodoTests: 0 })
		);
		expect(tally('vitest', file, false)).toEqual({ passed: 3, failed: 1, skipped: 0 });
	});
});

describe('closingLine', () => {
	it('sums the steps and names skipped tests only when there are some', () => {
		const steps = [
			{ passed: 2, failed: 0, skipped: 0 },
			{ passed: 3, failed: 1, skipped: 0 }
		];
		expect(closingLine(add(steps))).toBe('5 passed, 1 failed');
		expect(closingLine({ passed: 1, failed: 0, skipped: 4 })).toBe('1 passed, 0 failed, 4 skipped');
	});
});
