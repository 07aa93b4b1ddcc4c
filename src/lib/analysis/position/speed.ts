import type { Metric } from '../arena/metric';

/**
 * Speed in cm/s: distance between the samples `reach` before and after, over their time difference.
 * Both are clipped to the stretch, so it is one-sided at its ends.
 * @param stretch stretch of each sample, −1 for none
 * @param reach   samples each way, 1 or more
 * @returns NaN outside every stretch, where an end has no place, and in a stretch of one sample
 * @throws RangeError reach below 1
 * Cost: O(n).
 */
export function speedOf(
	tS: Float64Array,
	xCm: Float64Array,
	yCm: Float64Array,
	stretch: Int32Array,
	reach: number,
	metric: Metric
): Float64Array {
	if (!(reach >= 1)) throw new RangeError(`reach must be 1 sample or more, got ${reach}`);
	const out = new Float64Array(tS.length).fill(NaN);
	let first = 0;
	while (first < tS.length) {
		let last = first;
		while (last + 1 < tS.length && stretch[last + 1] === stretch[first]) last++;
		for (let i = first; i <= last && stretch[first] >= 0; i++) {
			const from = Math.max(first, i - reach);
			const to = Math.min(last, i + reach);
			if (to > from) {
				out[i] = metric(xCm[from], yCm[from], xCm[to], yCm[to]) / (tS[to] - tS[from]);
			}
		}
		first = last + 1;
	}
	return out;
}
