/** Bin of the highest finite rate, the lowest index in a tie; −1 when no rate is above zero. */
export function peakBin(ratesHz: Float64Array): number {
	let best = -1;
	let top = 0;
	for (let k = 0; k < ratesHz.length; k++) {
		if (ratesHz[k] > top) {
			top = ratesHz[k];
			best = k;
		}
	}
	return best;
}
