import type { Smoother } from './smoother';

/**
 * Information per spike of the smoothed map, straight from counts and without keeping the map: for
 * tests that need it many thousand times. Equal to `information(rateMap(counts))` up to rounding.
 * @param occupancyS seconds per bin
 * @returns reads counts (and overwrites them), gives bits per spike, NaN without a spike
 */
export function smoothedInformation(
	occupancyS: Float64Array,
	smooth: Smoother,
	minOccupancyS: number
): (counts: Float64Array) => number {
	const smoothedS = new Float64Array(occupancyS.length);
	smooth(occupancyS, smoothedS);
	const bins = Int32Array.from(occupancyS.keys()).filter((k) => occupancyS[k] >= minOccupancyS);
	const perSecond = Float64Array.from(bins, (k) => 1 / smoothedS[k]);
	let seconds = 0;
	for (const k of bins) seconds += occupancyS[k];
	const share = Float64Array.from(bins, (k) => occupancyS[k] / seconds);
	return (counts) => {
		smooth(counts, counts);
		let mean = 0;
		let bits = 0;
		for (let j = 0; j < bins.length; j++) {
			const rate = counts[bins[j]] * perSecond[j];
			if (!(rate > 0)) continue;
			const part = share[j] * rate;
			mean += part;
			bits += part * Math.log2(rate);
		}
		return mean > 0 ? bits / mean - Math.log2(mean) : NaN;
	};
}
