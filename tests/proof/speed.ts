import process from 'node:process';
import { CHECKOUT } from '../../src/commands/home/home';
import { runProgram } from '../../src/commands/machine/run-program';
import type { Report } from '../../src/commands/proof/report';

export const about = 'Seconds of each step of the numeric core on simulated days of three sizes';

/** Median errors in cm that the same steps have in double precision, seed 1. */
const MEDIAN_ERROR_CM = { S: 7.0721, M: 5.1511, L: 2.7485 } as const;

interface Line {
	step: string;
	size: keyof typeof MEDIAN_ERROR_CM;
	medianS: number;
	medianErrorCm?: number;
}

export default async function speed(report: Report): Promise<void> {
	const command = [process.execPath, 'src/commands/run.mjs', 'bench'];
	const { code, words } = await runProgram(command, { cwd: CHECKOUT });
	if (code !== 0) throw new Error(words);
	for (const text of words.split('\n')) {
		report.line(text);
		const line = JSON.parse(text) as Line;
		const expected = MEDIAN_ERROR_CM[line.size];
		if (line.step !== 'decode-100' || line.medianErrorCm === undefined) continue;
		if (Math.abs(line.medianErrorCm - expected) < 1e-3) continue;
		throw new Error(`${line.size}: a median error of ${line.medianErrorCm} cm, not ${expected}`);
	}
}
