import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { gaussianKernel } from '../maps/gaussian-kernel';
import { gridSmoother, type LineSmoother } from '../maps/smooth-line';

/**
 * ln of the unnormalised steps of a random walk on a track: −d(x, x′)²/2σ², d along the track, ring
 * or maze.
 * @param bin     places, as bins of the arena
 * @param sigmaCm above 0
 * @returns row-major [from][to]
 * Cost: O(places²).
 */
export function lineLogWeights(
	bins: Bins,
	bin: Int32Array,
	metric: Metric,
	sigmaCm: number
): Float64Array {
	const places = bin.length;
	const out = new Float64Array(places * places);
	for (let from = 0; from < places; from++) {
		for (let to = 0; to < places; to++) {
			const d = metric(bins.centreXCm[bin[from]], NaN, bins.centreXCm[bin[to]], NaN) / sigmaCm;
			out[from * places + to] = -(d * d) / 2;
		}
	}
	return out;
}

/** Steps of a random walk on a grid. */
export interface GridSteps {
	/** Gaussian along one axis, −r … r bins, cut at 4 σ. */
	readonly weights: Float64Array;
	/** Applies it along both axes; nothing lies beyond the edges. */
	readonly spread: LineSmoother;
	/** Sum of the steps from each bin to places that can be answered. */
	readonly rowSum: Float64Array;
}

/** The steps of a random walk over the places of a grid: a separable Gaussian. */
export function gridSteps(bins: Bins, bin: Int32Array, sigmaCm: number): GridSteps {
	const weights = gaussianKernel(sigmaCm / bins.binCm);
	const spread = gridSmoother(bins.binsX, bins.binsY, weights, 'zero');
	const rowSum = new Float64Array(bins.count);
	for (const k of bin) rowSum[k] = 1;
	spread(rowSum, rowSum);
	return { weights, spread, rowSum };
}
