import type { Smoother } from './smoother';

/** What turns smoothed counts into rates and weighs them; both 0 for bins with too little dwell. */
export interface WeightsOfBins {
	/** One over the smoothed seconds. */
	readonly perSecond: Float64Array;
	/** Share of the dwell. */
	readonly share: Float64Array;
}

/** @param occupancyS seconds per bin */
export function weightsOfBins(
	occupancyS: Float64Array,
	smooth: Smoother,
	minOccupancyS: number
): WeightsOfBins {
	const smoothedS = new Float64Array(occupancyS.length);
	smooth(occupancyS, smoothedS);
	const isKept = (k: number) => occupancyS[k] >= minOccupancyS;
	let seconds = 0;
	for (let k = 0; k < occupancyS.length; k++) if (isKept(k)) seconds += occupancyS[k];
	return {
		perSecond: smoothedS.map((s, k) => (isKept(k) ? 1 / s : 0)),
		share: occupancyS.map((s, k) => (isKept(k) ? s / seconds : 0))
	};
}

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
	const { perSecond, share } = weightsOfBins(occupancyS, smooth, minOccupancyS);
	return (counts) => {
		smooth(counts, counts);
		let mean = 0;
		let bits = 0;
		for (let k = 0; k < counts.length; k++) {
			const rate = counts[k] * perSecond[k];
			if (!(rate > 0)) continue;
			const part = share[k] * rate;
			mean += part;
			bits += part * Math.log2(rate);
		}
		return mean > 0 ? bits / mean - Math.log2(mean) : NaN;
	};
}
