/** Spike times on a clock of whole ticks fall on the edges of bins; a rounding error moves none. */
const SLACK_S = 1e-9;

/**
 * How often two spikes of one train lie each lag apart: counts per bin of lag from −reachS to
 * +reachS. A pair counts at both signs, so the counts are symmetric. The lag 0 (a spike with itself,
 * and spikes of the same moment) is left out, and there is no bin around it: the two middle bins are
 * (−binS, 0) and (0, binS). Bins hold the edge nearer to 0; the outermost also their far edge.
 * @param timesS ascending
 * @param reachS a whole number of bins
 * @returns pairs per bin, length 2 · reachS / binS, lags ascending
 * @throws RangeError times not ascending, binS not above 0, reachS no whole number of bins
 * Not corrected for the length of the session. Cost: O(spikes + pairs within reachS).
 */
export function autocorrelogram(
	timesS: Float64Array,
	{ binS = 0.001, reachS = 0.05 }: { readonly binS?: number; readonly reachS?: number } = {}
): Float64Array {
	if (!(binS > 0)) throw new RangeError(`bins must be above 0 s, got ${binS}`);
	const bins = Math.round(reachS / binS);
	if (!(bins >= 1) || Math.abs(bins * binS - reachS) > SLACK_S) {
		throw new RangeError(`the reach must be a whole number of bins, got ${reachS} and ${binS} s`);
	}
	const counts = new Float64Array(2 * bins);
	for (let i = 0; i < timesS.length; i++) {
		if (timesS[i] < timesS[i - 1]) throw new RangeError(`spike ${i} lies before the one before it`);
		for (let j = i + 1; j < timesS.length; j++) {
			const lagS = timesS[j] - timesS[i];
			if (lagS > reachS + SLACK_S) break;
			if (!(lagS > 0)) continue;
			const bin = Math.min(bins - 1, Math.floor((lagS + SLACK_S) / binS));
			counts[bins + bin]++;
			counts[bins - 1 - bin]++;
		}
	}
	return counts;
}
