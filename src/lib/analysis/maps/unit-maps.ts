import type { Smoother } from './smoother';
import { occupancyInto } from './occupancy';
import { rateMapper } from './rate-map';
import { spikeCountsInto } from './spike-counts';

/** Samples and the ground they are mapped on. */
export interface MapInput {
	readonly bin: Int32Array;
	readonly standS: Float64Array;
	readonly bins: number;
	readonly smooth: Smoother;
	readonly minOccupancyS: number;
}

/** Smoothed maps of several units over the same samples. */
export interface UnitMaps {
	/** Seconds per bin. */
	readonly occupancyS: Float64Array;
	/** Row-major [unit][bin], Hz, NaN where the dwell is too short. */
	readonly ratesHz: Float64Array;
}

/**
 * Rate maps of all units from the samples that `isUsed` marks.
 * @param samples position sample of each spike, for each unit
 * Cost: O(samples + spikes + units · smoothing).
 */
export function unitMaps(
	input: MapInput,
	samples: readonly Int32Array[],
	isUsed: Uint8Array
): UnitMaps {
	const occupancyS = new Float64Array(input.bins);
	occupancyInto(occupancyS, input.bin, input.standS, isUsed);
	const toRates = rateMapper(occupancyS, input.smooth, input.minOccupancyS);
	const counts = new Float64Array(input.bins);
	const ratesHz = new Float64Array(samples.length * input.bins);
	for (let u = 0; u < samples.length; u++) {
		spikeCountsInto(counts, samples[u], input.bin, isUsed);
		toRates(counts, ratesHz.subarray(u * input.bins, (u + 1) * input.bins));
	}
	return { occupancyS, ratesHz };
}
