import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { peakBin } from '../maps/peak';

/**
 * Way between the peaks of two maps, by the centres of their highest bins; the short way on a ring.
 * @returns cm; NaN when either map has no rate above zero
 */
export function peakShiftCm(
	aHz: Float64Array,
	bHz: Float64Array,
	{ centreXCm, centreYCm }: Bins,
	metric: Metric
): number {
	const a = peakBin(aHz);
	const b = peakBin(bHz);
	if (a < 0 || b < 0) return NaN;
	return metric(centreXCm[a], centreYCm[a], centreXCm[b], centreYCm[b]);
}
