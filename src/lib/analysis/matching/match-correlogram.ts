import { gaussianKernel } from '../maps/gaussian-kernel';
import { lineSmoother } from '../maps/smooth-line';

/** Autocorrelograms are compared over ± this much, in bins of `CORRELOGRAM_BIN_S`. */
export const CORRELOGRAM_REACH_S = 0.05;
export const CORRELOGRAM_BIN_S = 0.001;
/** Standard deviation of the smoothing, bins. */
const SIGMA_BINS = 2;
/** With fewer spike pairs than this the shape is mostly noise. */
const LEAST_PAIRS = 100;

/**
 * Autocorrelogram made ready for comparison: Gaussian smoothing over lag (σ 2 bins, mirrored at the
 * outer lags).
 * @param counts spike pairs per lag, −reach … +reach, each pair counted at both signs
 * @returns new array; empty with under 100 pairs, so that no feature is made of it
 */
export function matchCorrelogram(counts: Float64Array): Float64Array {
	const pairs = counts.reduce((sum, count) => sum + count, 0) / 2;
	if (!(pairs >= LEAST_PAIRS)) return new Float64Array(0);
	const layout = { count: counts.length, lines: 1, stride: 1, between: 0 };
	const out = new Float64Array(counts.length);
	lineSmoother(layout, gaussianKernel(SIGMA_BINS), 'reflect')(counts, out);
	return out;
}
