import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import { median } from '../lib/analysis/statistics/quantile';
import { crewOfOne, startCrew, type Crew } from './bench/crew';
import { decodeStep } from './bench/decode-step';
import { mapStep } from './bench/map-step';
import { readBenchOptions, type StepName } from './bench/options';
import { shiftStep } from './bench/shift-step';
import { simulateDay, type BenchDay } from './bench/simulate-day';
import { SIZES } from './bench/sizes';
import { tableStep } from './bench/table-step';
import { writeTables } from './bench/write-tables';

/** Every step runs unmeasured for as long as this, and at least twice: code is compiled as it runs. */
const WARMING_MS = 1500;
/** Spikes from which on a step is worth a second thread; below, handing over costs more. */
const WORTH_SHARING: Record<StepName, number> = {
	csv: 300_000,
	maps: 3_000_000,
	shifts: 0,
	'decode-100': 300_000,
	'decode-250': 300_000
};

/**
 * `npm run bench`: seconds for each step of the numeric core on simulated days, one line of JSON a
 * step. Every step is warmed up and then timed as often as asked for.
 */
export default async function bench(args: string[]): Promise<number> {
	const { sizes, steps, repetitions, threads, seed } = readBenchOptions(args);
	const folder = await mkdtemp(join(tmpdir(), 'quarterturn-bench-'));
	try {
		for (const size of sizes) {
			const day = simulateDay(SIZES[size], seed);
			const crew = startCrew(threads, day);
			for (const step of steps) {
				const isShort = day.spikeS.length < WORTH_SHARING[step];
				const workers = isShort ? crewOfOne(day) : crew;
				const run = await prepared(step, workers, day, folder);
				for (const end = performance.now() + WARMING_MS; performance.now() < end;) await run();
				const told = await run();
				const wall: number[] = [];
				const cpu: number[] = [];
				for (let k = 0; k < repetitions; k++) {
					const begun = performance.now();
					const used = process.cpuUsage();
					await run();
					wall.push((performance.now() - begun) / 1000);
					const { user, system } = process.cpuUsage(used);
					cpu.push((user + system) / 1e6);
				}
				const timed = { medianS: median(wall), leastS: Math.min(...wall), cpuS: median(cpu) };
				console.log(
					JSON.stringify({ step, size, threads: workers.threads, repetitions, ...timed, ...told })
				);
			}
			await crew.end();
		}
	} finally {
		await rm(folder, { recursive: true });
	}
	return 0;
}

/** Gets ready what is not timed. */
async function prepared(
	step: StepName,
	crew: Crew,
	day: BenchDay,
	folder: string
): Promise<() => Promise<object>> {
	switch (step) {
		case 'csv': {
			const tables = await writeTables(day, folder);
			return () => tableStep(crew, tables);
		}
		case 'maps':
			return () => mapStep(crew, day);
		case 'shifts':
			return () => shiftStep(crew, day);
		case 'decode-100':
			return () => decodeStep(crew, day, 0.1);
		case 'decode-250':
			return () => decodeStep(crew, day, 0.25);
	}
}
