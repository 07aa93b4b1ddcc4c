/** How much place and firing tell of each other. NaN where undefined. */
export interface Information {
	readonly meanRateHz: number;
	readonly bitsPerSpike: number;
	readonly bitsPerS: number;
	readonly sparsity: number;
	readonly selectivity: number;
}

/**
 * Spatial information of a rate map (Skaggs et al. 1993): with p the share of dwell in a bin, λ its
 * rate and R = Σ p λ, I = Σ p (λ/R) log₂(λ/R) bits per spike, R·I bits per second. Sparsity is
 * R²/Σ p λ² (Jung et al. 1994), selectivity max λ / R. Bins with NaN rate or no dwell are left out
 * of every sum. All but the mean are NaN when R is 0.
 * Biased upwards when spikes are few: compare it with shuffled spikes.
 * @param ratesHz    Hz per bin, NaN undefined
 * @param occupancyS seconds per bin, same length
 * @throws RangeError lengths differ
 */
export function information(ratesHz: Float64Array, occupancyS: Float64Array): Information {
	if (ratesHz.length !== occupancyS.length) {
		throw new RangeError(`lengths differ: ${ratesHz.length} and ${occupancyS.length}`);
	}
	let seconds = 0;
	let spikes = 0;
	let squares = 0;
	let top = 0;
	for (let k = 0; k < ratesHz.length; k++) {
		const rate = ratesHz[k];
		if (!Number.isFinite(rate) || !(occupancyS[k] > 0)) continue;
		seconds += occupancyS[k];
		spikes += occupancyS[k] * rate;
		squares += occupancyS[k] * rate * rate;
		if (rate > top) top = rate;
	}
	const meanRateHz = spikes / seconds;
	if (!(meanRateHz > 0)) {
		return { meanRateHz, bitsPerSpike: NaN, bitsPerS: NaN, sparsity: NaN, selectivity: NaN };
	}
	let bits = 0;
	for (let k = 0; k < ratesHz.length; k++) {
		const ratio = ratesHz[k] / meanRateHz;
		if (ratio > 0 && occupancyS[k] > 0) bits += occupancyS[k] * ratio * Math.log2(ratio);
	}
	const bitsPerSpike = bits / seconds;
	return {
		meanRateHz,
		bitsPerSpike,
		bitsPerS: bitsPerSpike * meanRateHz,
		sparsity: (meanRateHz * meanRateHz * seconds) / squares,
		selectivity: top / meanRateHz
	};
}
