import { newKernel } from '../kernel/kernel';
import { pearson } from '../statistics/pearson';
import type { TimedSpikes } from '../spikes/timed-spikes';
import { addCounts, unitRoom } from './counts-of-units';
import type { Separable } from './separable';
import type { Smoother } from './smoother';

/** A day whose maps are drawn twice, from alternate blocks of time. */
export interface HalvedDay {
	readonly tS: Float64Array;
	/** Bin of each sample. */
	readonly bin: Int32Array;
	/** Seconds a sample stands for. */
	readonly sampleS: number;
	readonly spikes: TimedSpikes;
	readonly smooth: Smoother & { readonly separable: Separable };
	/** Length of a block; even blocks are the first half, odd ones the second. */
	readonly blockS: number;
	/** Rates are floored here. */
	readonly leastHz: number;
}

/**
 * Counts of [half][bin][unit] from some of the spikes. The sum over all parts is what `halfMaps`
 * wants, so the counting can be shared among threads.
 * @param from, to spikes
 */
export function halfCounts(day: HalvedDay, from: number, to: number): Int32Array {
	const room = unitRoom(day.spikes.units);
	const half = binsOf(day) * room;
	const counts = new Int32Array(2 * half);
	const offset = new Int32Array(day.bin.length);
	for (let i = 0; i < offset.length; i++) {
		offset[i] = day.bin[i] * room + (Math.floor(day.tS[i] / day.blockS) & 1) * half;
	}
	addCounts(counts, day.tS, offset, day.spikes, from, to);
	return counts;
}

/** Maps of some units. */
export interface HalfMaps {
	/** [unit][bin], Hz, from all time; NaN where nobody was. */
	readonly ratesHz: Float32Array;
	/** Correlation of the two halves' maps over bins visited in both; NaN for a flat map. */
	readonly splitHalfR: Float64Array;
}

/**
 * Smoothed maps of some units and how alike their halves are, in single precision.
 * @param counts of all spikes, [half][bin][unit]
 * @param fromUnit a multiple of four
 * @returns null where there is no kernel
 */
export function halfMaps(
	day: HalvedDay,
	counts: Int32Array,
	fromUnit: number,
	toUnit: number
): HalfMaps | null {
	const kernel = newKernel();
	if (!kernel) return null;
	const { binsX, binsY, weights } = day.smooth.separable;
	const bins = binsX * binsY;
	const room = unitRoom(day.spikes.units);
	const reach = (weights.length - 1) / 2;
	const reachY = binsY > 1 ? reach : 0;
	const half = kernel.keep(Float32Array.from(weights.subarray(reach)));
	const row = kernel.take(16 * (binsX + 2 * reach));
	const rows = kernel.take(16 * binsX * (binsY + 2 * reachY));
	const laid = kernel.keep(counts);
	const out = [kernel.take(16 * bins), kernel.take(16 * bins)];
	const maps = out.map((at) => kernel.float32(at, 4 * bins));
	const occupancyS = [new Float64Array(bins), new Float64Array(bins)];
	for (let i = 0; i < day.bin.length; i++) {
		occupancyS[Math.floor(day.tS[i] / day.blockS) & 1][day.bin[i]] += day.sampleS;
	}
	const [firstS, secondS] = occupancyS.map((seconds) => {
		const smoothed = new Float64Array(bins);
		day.smooth(seconds, smoothed);
		return smoothed;
	});
	const isInBoth = Uint8Array.from(occupancyS[0], (s, k) =>
		s > 0 && occupancyS[1][k] > 0 ? 1 : 0
	);
	const isVisited = Uint8Array.from(occupancyS[0], (s, k) => (s + occupancyS[1][k] > 0 ? 1 : 0));
	const shared = isInBoth.reduce((sum, is) => sum + is, 0);
	const [first, second] = [new Float64Array(shared), new Float64Array(shared)];
	const ratesHz = new Float32Array((toUnit - fromUnit) * bins);
	const splitHalfR = new Float64Array(toUnit - fromUnit);
	for (let unit = fromUnit; unit < toUnit; unit += 4) {
		for (const [h, at] of out.entries()) {
			const from = laid + 4 * (h * bins * room + unit);
			kernel.call.smoothFour(
				...[from, 0, 4 * room, binsX, binsY, half, reach, reachY, row, rows, at]
			);
		}
		for (let lane = 0; lane < Math.min(4, toUnit - unit); lane++) {
			const u = unit + lane - fromUnit;
			let n = 0;
			for (let k = 0; k < bins; k++) {
				const a = maps[0][4 * k + lane];
				const b = maps[1][4 * k + lane];
				ratesHz[u * bins + k] = isVisited[k]
					? Math.max(day.leastHz, (a + b) / (firstS[k] + secondS[k]))
					: NaN;
				if (!isInBoth[k]) continue;
				first[n] = Math.max(day.leastHz, a / firstS[k]);
				second[n++] = Math.max(day.leastHz, b / secondS[k]);
			}
			splitHalfR[u] = pearson(first, second);
		}
	}
	return { ratesHz, splitHalfR };
}

function binsOf({ smooth }: HalvedDay): number {
	return smooth.separable.binsX * smooth.separable.binsY;
}
