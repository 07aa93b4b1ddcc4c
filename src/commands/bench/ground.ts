import { gaussianKernel } from '../../lib/analysis/maps/gaussian-kernel';
import type { Separable } from '../../lib/analysis/maps/separable';
import { gridSmoother, lineSmoother } from '../../lib/analysis/maps/smooth-line';
import type { Smoother } from '../../lib/analysis/maps/smoother';
import type { TimedSpikes } from '../../lib/analysis/spikes/timed-spikes';
import type { BenchDay } from './simulate-day';
import type { DaySize } from './sizes';

/** Bins of smoothing. */
const SIGMA_BINS = 1.5;

/** Bin of each sample; places on the far edge take the last bin. */
export function binsOfSamples({ size, xCm, yCm }: BenchDay): Int32Array {
	const { binsX, binsY } = size;
	const wide = size.widthCm / binsX;
	const high = size.heightCm / binsY;
	const clip = (value: number, bins: number) => Math.max(0, Math.min(bins - 1, Math.floor(value)));
	const out = new Int32Array(xCm.length);
	for (let i = 0; i < out.length; i++) {
		out[i] = clip(yCm[i] / high, binsY) * binsX + clip(xCm[i] / wide, binsX);
	}
	return out;
}

/** The spikes of a day, all units on one list. */
export function spikesOfDay({ spikeS, spikeUnit, size }: BenchDay): TimedSpikes {
	return { timeS: spikeS, unit: spikeUnit, units: size.units };
}

/** Gaussian over bins, nothing beyond the edges. */
export function smootherOfSize({ binsX, binsY }: DaySize): Smoother & { separable: Separable } {
	const weights = gaussianKernel(SIGMA_BINS);
	const smooth =
		binsY > 1
			? gridSmoother(binsX, binsY, weights, 'zero')
			: lineSmoother({ count: binsX, lines: 1, stride: 1, between: 0 }, weights, 'zero');
	return Object.assign(smooth, { separable: { binsX, binsY, weights, isRing: false } });
}

/** Centres of the bins. */
export function centresOf({ binsX, binsY, widthCm, heightCm }: DaySize): {
	xCm: Float64Array;
	yCm: Float64Array;
} {
	const bins = Int32Array.from({ length: binsX * binsY }, (_, k) => k);
	return {
		xCm: Float64Array.from(bins, (k) => ((k % binsX) + 0.5) * (widthCm / binsX)),
		yCm: Float64Array.from(bins, (k) => (Math.floor(k / binsX) + 0.5) * (heightCm / binsY))
	};
}

/** A thread's share of `count` things, in whole steps. */
export function share(
	count: number,
	thread: number,
	threads: number,
	step = 1
): { from: number; to: number } {
	const edge = (k: number) =>
		k === threads ? count : Math.floor((count * k) / threads / step) * step;
	return { from: edge(thread), to: edge(thread + 1) };
}
