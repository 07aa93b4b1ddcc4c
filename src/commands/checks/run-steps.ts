import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Refusal } from '../bootstrap/refusal.mjs';
import { CHECKOUT } from '../home/home';
import { startBound, type BoundProcess } from '../machine/bound-process';
import { findProgram, installPackage } from '../machine/debian';
import type { Step } from './steps';
import { add, closingLine, tally, type Tally } from './tally';

/** A person's own settings must not reach the tests, nor their database above all. */
const OUTSIDE = [
	'DATABASE_URL',
	'DATABASE_OWNER_URL',
	'SMTP_URL',
	'MAIL_FROM',
	'STORAGE_URL',
	'ORIGIN',
	'PORT',
	'HOST',
	'SECRET_KEY',
	'LAB_TIME_ZONE',
	'WORKERS',
	'UPLOAD_LIMIT_MB',
	'DEMO',
	'QUARTERTURN_HOME',
	'NODE_ENV'
];

interface Outcome {
	step: Step;
	tally: Tally;
	isGood: boolean;
	seconds: number;
}

/**
 * Runs each step even when an earlier one failed, and closes with the sum.
 * @returns the exit code
 */
export async function runSteps(steps: Step[]): Promise<number> {
	const folder = mkdtempSync(join(tmpdir(), 'quarterturn-reports-'));
	let current: BoundProcess | undefined;
	let isStopped = false;
	const stop = () => {
		isStopped = true;
		void current?.stop();
	};
	process.once('SIGINT', stop).once('SIGTERM', stop);

	const outcomes: Outcome[] = [];
	try {
		for (const step of steps) {
			if (isStopped) break;
			console.log(`\n── ${step.name}: ${step.about}`);
			const begun = performance.now();
			const reportFile = join(folder, `${step.name}.json`);
			const isGood = await runStep(step, reportFile, (bound) => (current = bound));
			const seconds = (performance.now() - begun) / 1000;
			outcomes.push({ step, isGood, seconds, tally: tally(step.count, reportFile, isGood) });
		}
	} finally {
		rmSync(folder, { recursive: true, force: true });
	}
	console.log(`\n${outcomes.map(outcomeLine).join('\n')}`);
	if (isStopped) {
		console.log('Stopped before the end.');
		return 130;
	}
	console.log(`\n${closingLine(add(outcomes.map((outcome) => outcome.tally)))}`);
	return outcomes.every(({ isGood }) => isGood) ? 0 : 1;
}

async function runStep(
	step: Step,
	reportFile: string,
	onStart: (bound: BoundProcess) => void
): Promise<boolean> {
	try {
		for (const wanted of step.needs ?? []) {
			if (!findProgram(wanted.name)) await installPackage(wanted);
		}
	} catch (error) {
		if (!(error instanceof Refusal)) throw error;
		console.log(error.message);
		return false;
	}
	const { words, env } = step.command(reportFile);
	const outside = Object.fromEntries(OUTSIDE.map((name) => [name, undefined]));
	const bound = startBound(words, {
		stopSignal: 'TERM',
		patienceMs: 30_000,
		cwd: CHECKOUT,
		env: { ...process.env, ...outside, ...env },
		stdout: 1,
		stderr: 2
	});
	onStart(bound);
	return (await bound.ended) === 0;
}

function outcomeLine({ step, tally: counted, isGood, seconds }: Outcome): string {
	const mark = isGood ? 'passed' : 'FAILED';
	const detail = step.count === 'one' ? '' : `  ${closingLine(counted)}`;
	return `${mark}  ${step.name.padEnd(10)}${seconds.toFixed(1).padStart(7)} s${detail}`;
}
