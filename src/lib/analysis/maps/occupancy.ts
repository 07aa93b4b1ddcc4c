/**
 * Seconds spent in each bin: the standing times of the samples that count.
 * @param bin    bin of each sample, −1 for none
 * @param isUsed 1 for samples that count
 * @param out    filled anew, one value per bin
 */
export function occupancyInto(
	out: Float64Array,
	bin: Int32Array,
	standS: Float64Array,
	isUsed: Uint8Array
): void {
	out.fill(0);
	for (let i = 0; i < bin.length; i++) if (isUsed[i] && bin[i] >= 0) out[bin[i]] += standS[i];
}
