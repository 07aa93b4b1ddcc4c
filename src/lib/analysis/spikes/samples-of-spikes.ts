/**
 * The position sample each spike belongs to: the last one at or before it, if that sample's
 * standing time covers the spike.
 * @param spikeS  ascending
 * @param tS      ascending
 * @param standS  how long each sample stands, 0 where it does not count
 * @returns sample index, −1 for a spike with no position
 * Cost: one merge pass, O(spikes + samples).
 */
export function samplesOfSpikes(
	spikeS: Float64Array,
	tS: Float64Array,
	standS: Float64Array
): Int32Array {
	const out = new Int32Array(spikeS.length).fill(-1);
	let i = -1;
	for (let k = 0; k < spikeS.length; k++) {
		while (i + 1 < tS.length && tS[i + 1] <= spikeS[k]) i++;
		if (i >= 0 && spikeS[k] - tS[i] < standS[i]) out[k] = i;
	}
	return out;
}
