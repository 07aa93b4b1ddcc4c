import type { Circles } from './circles';

export interface AdaptiveSettings {
	/** Usual values are 10⁴ to 10⁶; it belongs to the sampling rate. */
	readonly alpha: number;
	/** Position samples per second, Hz. */
	readonly sampleRateHz: number;
	/** Bins less visited are NaN; must be above 0. */
	readonly minOccupancyS: number;
}

/**
 * Firing rates smoothed just as much as each place needs: about every bin a circle grows, a bin at a
 * time, until its radius ρ ≥ α / (N √S), with N position samples and S spikes inside; the rate is
 * sample rate · S / N (Skaggs et al. 1996). Information values of maps with different α must not be
 * compared.
 * @param counts  spikes per bin
 * @param samples position samples per bin that count, same length
 * @returns Hz per bin, new array. NaN where the bin itself was visited for less than
 *          `minOccupancyS`, and where even the whole arena is too little for this α; 0 throughout
 *          the visited bins for a unit without spikes
 * @throws RangeError lengths differ, or a setting not above 0
 * Cost: O(bins · bins in the circles).
 */
export function adaptiveRates(
	counts: Float64Array,
	samples: Float64Array,
	circles: Circles,
	{ alpha, sampleRateHz, minOccupancyS }: AdaptiveSettings
): Float64Array {
	if (counts.length !== samples.length) {
		throw new RangeError(`lengths differ: ${counts.length} and ${samples.length}`);
	}
	for (const setting of [alpha, sampleRateHz, minOccupancyS]) {
		if (!(setting > 0)) throw new RangeError(`settings must be above 0, got ${setting}`);
	}
	const hasSpikes = counts.some((count) => count > 0);
	return counts.map((_, bin) => {
		if (!(samples[bin] >= minOccupancyS * sampleRateHz)) return NaN;
		if (!hasSpikes) return 0;
		let inside = 0;
		let spikes = 0;
		const take = (near: number) => {
			inside += samples[near];
			spikes += counts[near];
		};
		circles.each(bin, 0, take);
		for (let radius = 1; radius <= circles.largest; radius++) {
			circles.each(bin, radius, take);
			if (radius * inside * Math.sqrt(spikes) >= alpha) return (sampleRateHz * spikes) / inside;
		}
		return NaN;
	});
}
