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

/** How many numbers counts of [half][bin][unit] are. */
export function halfRoom(day: Pick<HalvedDay, 'smooth' | 'spikes'>): number {
	return 2 * binsOf(day) * unitRoom(day.spikes.units);
}

/**
 * Adds some of the spikes to counts of [half][bin][unit]. `halfMaps` wants the counts of all spikes,
 * in as many parts as one likes, so the counting can be shared among threads.
 * @param from, to spikes
 */
export function halfCounts(day: HalvedDay, from: number, to: number, counts: Int32Array): void {
	const room = unitRoom(day.spikes.units);
	const half = binsOf(day) * room;
	const offset = new Int32Array(day.bin.length);
	for (let i = 0; i < offset.length; i++) {
		offset[i] = day.bin[i] * room + (Math.floor(day.tS[i] / day.blockS) & 1) * half;
	}
	addCounts(counts, day.tS, offset, day.spikes, from, to);
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
 * @param parts counts of [half][bin][unit] that add up to those of all spikes
 * @param fromUnit a multiple of four
 * @returns null where there is no kernel
 */
export function halfMaps(
	day: HalvedDay,
	parts: readonly Int32Array[],
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
	const own = unitRoom(toUnit - fromUnit);
	const laid = kernel.take(8 * bins * own);
	const out = [kernel.take(16 * bins), kernel.take(16 * bins)];
	const maps = out.map((at) => kernel.float32(at, 4 * bins));
	sumInto(kernel.int32(laid, 2 * bins * own), parts, room, fromUnit, own);
	const occupancyS = [new Float64Array(bins), new Float64Array(bins)];
	for (let i = 0; i < day.bin.length; i++) {
		occupancyS[Math.floor(day.tS[i] / day.blockS) & 1][day.bin[i]] += day.sampleS;
	}
	const smoothedS = occupancyS.map((seconds) => {
		const smoothed = new Float64Array(bins);
		day.smooth(seconds, smoothed);
		return smoothed;
	});
	const [perFirst, perSecond] = smoothedS.map((seconds) => seconds.map((s) => 1 / s));
	const perAll = smoothedS[0].map((s, k) => 1 / (s + smoothedS[1][k]));
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
			const from = laid + 4 * (h * bins * own + unit - fromUnit);
			kernel.call.smoothFour(
				...[from, 0, 4 * own, binsX, binsY, half, reach, reachY, row, rows, at]
			);
		}
		for (let lane = 0; lane < Math.min(4, toUnit - unit); lane++) {
			const u = unit + lane - fromUnit;
			let n = 0;
			for (let k = 0; k < bins; k++) {
				const a = maps[0][4 * k + lane];
				const b = maps[1][4 * k + lane];
				ratesHz[u * bins + k] = isVisited[k] ? Math.max(day.leastHz, (a + b) * perAll[k]) : NaN;
				if (!isInBoth[k]) continue;
				first[n] = Math.max(day.leastHz, a * perFirst[k]);
				second[n++] = Math.max(day.leastHz, b * perSecond[k]);
			}
			splitHalfR[u] = pearson(first, second);
		}
	}
	return { ratesHz, splitHalfR };
}

/** The counts of some units, all parts together: [row][unit]. */
function sumInto(
	out: Int32Array,
	parts: readonly Int32Array[],
	room: number,
	fromUnit: number,
	units: number
): void {
	for (const part of parts) {
		for (let to = 0, from = fromUnit; to < out.length; to += units, from += room) {
			for (let u = 0; u < units; u++) out[to + u] += part[from + u];
		}
	}
}

function binsOf({ smooth }: Pick<HalvedDay, 'smooth'>): number {
	return smooth.separable.binsX * smooth.separable.binsY;
}
