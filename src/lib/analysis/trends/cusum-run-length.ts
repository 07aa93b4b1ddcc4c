import { normalCdf, normalDensity } from '../statistics/normal';
import { gaussLegendre } from './gauss-legendre';
import { runLength } from './run-length-equation';

/** Enough for h up to about 20 at 1e-8. */
const NODES = 96;

/**
 * Mean number of values until an upper tabular CUSUM passes its limit: independent normal values of
 * unit variance about the target, sum started at 0.
 * @param k     ≥ 0, in standard deviations
 * @param h     limit, > 0
 * @param shift of the mean, in standard deviations
 * @throws RangeError k or h out of range
 * Integral equation by Gauss–Legendre quadrature, with 0 as a state of its own. Cost: O(nodes³).
 */
export function oneSidedCusumRunLength(k: number, h: number, shift: number): number {
	if (!(k >= 0 && h > 0)) throw new RangeError(`k must be ≥ 0 and h above 0: ${k}, ${h}`);
	const { x, weight } = gaussLegendre(NODES, 0, h);
	return runLength(Float64Array.of(0, ...x), (from, j) =>
		j === 0
			? normalCdf(k - from - shift)
			: normalDensity(x[j - 1] + k - from - shift) * weight[j - 1]
	);
}

/**
 * Mean number of values until a two-sided tabular CUSUM alarms, both sums started at 0:
 * 1/(1/up + 1/down) of the one-sided ones, exact when the sums cannot both stand high (k ≥ 0).
 */
export function cusumRunLength(k: number, h: number, shift: number): number {
	const up = oneSidedCusumRunLength(k, h, shift);
	const down = oneSidedCusumRunLength(k, h, -shift);
	return 1 / (1 / up + 1 / down);
}
