/**
 * Spikes in each bin.
 * @param samples position sample of each spike, −1 for none
 * @param isUsed  1 for samples that count
 * @param out     filled anew, one value per bin
 */
export function spikeCountsInto(
	out: Float64Array,
	samples: Int32Array,
	bin: Int32Array,
	isUsed: Uint8Array
): void {
	out.fill(0);
	for (let k = 0; k < samples.length; k++) {
		const i = samples[k];
		if (i >= 0 && isUsed[i] && bin[i] >= 0) out[bin[i]]++;
	}
}
