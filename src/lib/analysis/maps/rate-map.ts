import type { Smoother } from './smoother';

/**
 * Turns spike counts into firing rates for one dwell: smoothed counts over smoothed dwell, the
 * Poisson maximum-likelihood local estimate. Unvisited bins add nothing to either sum. Bins whose
 * own (unsmoothed) dwell is under `minOccupancyS` are NaN, never 0.
 * @param occupancyS    seconds per bin
 * @param minOccupancyS must be above 0
 * @returns reads `counts`, writes Hz per bin to `out`
 * @throws RangeError minOccupancyS not above 0
 */
export function rateMapper(
	occupancyS: Float64Array,
	smooth: Smoother,
	minOccupancyS: number
): (counts: Float64Array, out: Float64Array) => void {
	if (!(minOccupancyS > 0))
		throw new RangeError(`least dwell must be above 0, got ${minOccupancyS}`);
	const perSecond = new Float64Array(occupancyS.length);
	smooth(occupancyS, perSecond);
	for (let k = 0; k < perSecond.length; k++) {
		perSecond[k] = occupancyS[k] >= minOccupancyS ? 1 / perSecond[k] : NaN;
	}
	return (counts, out) => {
		smooth(counts, out);
		for (let k = 0; k < out.length; k++) out[k] *= perSecond[k];
	};
}
