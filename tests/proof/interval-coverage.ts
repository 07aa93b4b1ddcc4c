import {
	drawGroups,
	drawnMedians,
	percentileInterval
} from '../../src/lib/analysis/decoding/bootstrap';
import { widenedInterval } from '../../src/lib/analysis/decoding/widened-interval';
import { seeded } from '../../src/lib/analysis/random/seeded';
import { median } from '../../src/lib/analysis/statistics/quantile';
import type { Report } from '../../src/commands/proof/report';
import { decodedRun, trackCells, type DecodedRun } from '../factories/track-session';

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
		plainBlocks: score(plain, byBlocks),
		widenedBlocks: score(widened, byBlocks),
		plainLaps: score(plain, byLaps),
		widenedLaps: score(widened, byLaps)
	};
	for (let k = 0; k < TRIED; k++) {
		const run = session(TRUTH + k);
		for (const one of Object.values(scores)) one.take(run, k, trueCm);
	}
	report.line(
		`${blocks} blocks of ${BLOCK_S} s, 25 units on 180 cm: true median ${trueCm.toFixed(3)} cm (${TRUTH} sessions), ${TRIED} intervals of ${DRAWS} draws`
	);
	report.line(`blocks, plain percentile (session@1 without laps): ${scores.plainBlocks.told()}`);
	report.line(`blocks, widened percentile: ${scores.widenedBlocks.told()}`);
	report.line(`laps, plain percentile (session@1 with laps): ${scores.plainLaps.told()}`);
	report.line(`laps, widened percentile: ${scores.widenedLaps.told()}`);
	return scores.widenedBlocks.share();
}

const byBlocks = ({ block, blocks }: DecodedRun) => ({ group: block, groups: blocks });
const byLaps = ({ lap, laps }: DecodedRun) => ({ group: lap, groups: laps });

function score(
	interval: Interval,
	groupsOf: (run: DecodedRun) => { group: Int32Array; groups: number }
) {
	let held = 0;
	let above = 0;
	let widthCm = 0;
	let taken = 0;
	return {
		take(run: DecodedRun, k: number, trueCm: number) {
			const { group, groups } = groupsOf(run);
			const draws = drawGroups(groups, DRAWS, seeded(k, 'interval'));
			const [low, high] = interval(drawnMedians(run.errorCm, group, draws), groups);
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
