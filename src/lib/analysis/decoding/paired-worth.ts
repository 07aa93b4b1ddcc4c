import { drawnMeans, drawnMedians } from './bootstrap';
import { mean } from '../statistics/mean';
import { median } from '../statistics/quantile';
import { widenedInterval } from './widened-interval';

/** What decoding loses without some units, with intervals; NaN where undefined. */
export interface PairedWorth {
	/** Median error without minus with: positive where the units help, cm. */
	readonly errorCm: number;
	readonly errorIntervalCm: [number, number];
	/** Mean log₂ posterior at the true bin, with minus without, bits. */
	readonly bits: number;
	readonly bitsInterval: [number, number];
}

/**
 * Worth of a bundle from the same windows decoded with and without it. Both sides of a difference
 * are drawn with the same laps or blocks, so what makes a lap hard for either cancels.
 * Bundles that tell the same share the credit: the figures do not add up. Say how many units were
 * left out beside them, or size alone is credited.
 * @param withCm,withoutCm error of each window, cm
 * @param bits  log₂ posterior at the true bin with minus without, NaN unscorable
 * @param group lap or block of each window
 * @param draws from `drawGroups`; empty for no interval (fewer than five groups)
 * @throws RangeError lengths differ
 * Cost: O(draws · windows).
 */
export function pairedWorth(
	withCm: Float64Array,
	withoutCm: Float64Array,
	bits: Float64Array,
	group: Int32Array,
	draws: readonly Int32Array[],
	share = 0.9
): PairedWorth {
	for (const { length } of [withoutCm, bits, group]) {
		if (length !== withCm.length) throw new RangeError(`${length} windows for ${withCm.length}`);
	}
	const groups = draws.length > 0 ? draws[0].length : 0;
	const without = drawnMedians(withoutCm, group, draws);
	const differences = drawnMedians(withCm, group, draws).map((is, d) => without[d] - is);
	return {
		errorCm: median(withoutCm) - median(withCm),
		errorIntervalCm: widenedInterval(differences, share, groups),
		bits: mean(bits.filter((value) => !Number.isNaN(value))),
		bitsInterval: widenedInterval(drawnMeans(bits, group, groups, draws), share, groups)
	};
}
