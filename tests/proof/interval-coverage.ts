import {
	drawGroups,
	drawnMedians,
	percentileInterval
} from '../../src/lib/analysis/decoding/bootstrap';
import { widenedInterval } from '../../src/lib/analysis/decoding/widened-interval';
import { seeded } from '../../src/lib/analysis/random/seeded';
import { median } from '../../src/lib/analysis/statistics/quantile';
import type { Report } from '../../src/commands/proof/report';
import { decodedRun, trackCells } from '../factories/track-session';

export const about =
	'95 % intervals of the median decoding error hold its true value in 93 to 97 % of sessions';

/** Sessions whose windows together give the true median, and others whose intervals are tried. */
const TRUTH = 500;
const TRIED = 1500;
const DRAWS = 1000;
const BLOCK_S = 20;
const BAND = { least: 0.93, most: 0.97 };

type Interval = (medians: Float64Array, groups: number) => [number, number];

const plain: Interval = (medians) => percentileInterval(medians, 0.95);
const widened: Interval = (medians, groups) => widenedInterval(medians, 0.95, groups);

export default async function intervalCoverage(report: Report): Promise<void> {
	const many = tried(30, report);
	tried(10, report);
	if (!(many >= BAND.least && many <= BAND.most)) {
		throw new Error(`with 30 blocks the widened interval covers ${percent(many)}`);
	}
}

/** @returns coverage of the widened interval over blocks */
function tried(blocks: number, report: Report): number {
	const cells = trackCells(25, 5);
	const session = (k: number) => decodedRun(cells, blocks * BLOCK_S, BLOCK_S, 1000 + k);
	const truth: number[] = [];
	for (let k = 0; k < TRUTH; k++) for (const error of session(k).errorCm) truth.push(error);
	const trueCm = median(truth);
	const scores = {
		plainBlocks: score(plain),
		widenedBlocks: score(widened),
		plainLaps: score(plain),
		widenedLaps: score(widened)
	};
	for (let k = 0; k < TRIED; k++) {
		const run = session(TRUTH + k);
		const overBlocks = medians(run.errorCm, run.block, run.blocks, k);
		scores.plainBlocks.take(overBlocks, run.blocks, trueCm);
		scores.widenedBlocks.take(overBlocks, run.blocks, trueCm);
		const overLaps = medians(run.errorCm, run.lap, run.laps, k);
		scores.plainLaps.take(overLaps, run.laps, trueCm);
		scores.widenedLaps.take(overLaps, run.laps, trueCm);
	}
	report.line(
		`${blocks} blocks of ${BLOCK_S} s, 25 units on 180 cm: true median ${trueCm.toFixed(3)} cm (${TRUTH} sessions), ${TRIED} intervals of ${DRAWS} draws`
	);
	report.line(`blocks, plain percentile: ${scores.plainBlocks.told()}`);
	report.line(
		`blocks, widened percentile, as a session without laps has it: ${scores.widenedBlocks.told()}`
	);
	report.line(`laps, plain percentile: ${scores.plainLaps.told()}`);
	report.line(
		`laps, widened percentile, as a session with laps has it: ${scores.widenedLaps.told()}`
	);
	return scores.widenedBlocks.share();
}

function medians(
	errorCm: Float64Array,
	group: Int32Array,
	groups: number,
	seed: number
): Float64Array {
	return drawnMedians(errorCm, group, drawGroups(groups, DRAWS, seeded(seed, 'interval')));
}

/** Counts how often an interval holds the truth. */
function score(interval: Interval) {
	let held = 0;
	let above = 0;
	let widthCm = 0;
	let taken = 0;
	return {
		take(drawn: Float64Array, groups: number, trueCm: number) {
			const [low, high] = interval(drawn, groups);
			if (low <= trueCm && trueCm <= high) held++;
			else if (low > trueCm) above++;
			widthCm += high - low;
			taken++;
		},
		share: () => held / taken,
		told: () => {
			const share = held / taken;
			const seShare = Math.sqrt((share * (1 - share)) / taken);
			return `${percent(share)} (standard error ${percent(seShare)}), ${above} too high and ${taken - held - above} too low, ${(widthCm / taken).toFixed(3)} cm wide`;
		}
	};
}

function percent(share: number): string {
	return `${(100 * share).toFixed(1)} %`;
}
