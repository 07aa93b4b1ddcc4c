import type { Waveform } from '../quality/best-channel';

/** What of a unit is compared with units of other days. */
export interface MatchUnit {
	/** Mean waveform on all channels of the bundle, the same channels and samples every day. */
	readonly waveform: Waveform;
	/** Smoothed autocorrelogram, the same lags for every unit; empty when too few pairs made it. */
	readonly correlogram: Float64Array;
	/** Mean rate over the time that was sorted. */
	readonly rateHz: number;
	/**
	 * Estimated depth of the cell in the tissue, NaN where a unit has none of its own: on a probe, the
	 * depth of the bundle and the place along it where the unit is largest.
	 */
	readonly depthUm: number;
}

/** Units of one bundle on one recorded day. */
export interface BundleDay {
	/** Lab days since some first one, ascending; days without a recording are not in the list. */
	readonly day: number;
	/** Depth of the bundle that day, NaN when not known. */
	readonly bundleDepthUm: number;
	readonly units: readonly MatchUnit[];
}
