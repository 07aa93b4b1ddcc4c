/**
 * Probability that the animal is inside a cell's field, from `windows` equal windows of which
 * `spikes` held a spike: posterior odds = prior odds · (pIn/pOut)^k · ((1 − pIn)/(1 − pOut))^(n − k).
 * Windows of one burst are not independent, so this is the most that they can tell.
 * @param prior    probability of being inside, [0, 1]
 * @param pInside  probability of a spike in one window inside the field
 * @param pOutside the same outside
 * @returns NaN when neither state could give these windows
 * @throws RangeError a probability outside [0, 1], or spikes not from 0 to `windows`
 */
export function twoStatePosterior(
	prior: number,
	spikes: number,
	windows: number,
	pInside: number,
	pOutside: number
): number {
	for (const p of [prior, pInside, pOutside]) {
		if (!(p >= 0 && p <= 1)) throw new RangeError(`${p} is no probability`);
	}
	if (!(spikes >= 0 && spikes <= windows)) {
		throw new RangeError(`${spikes} of ${windows} windows cannot hold a spike`);
	}
	const weight = (start: number, p: number) =>
		Math.log(start) + times(spikes, p) + times(windows - spikes, 1 - p);
	const inside = weight(prior, pInside);
	const outside = weight(1 - prior, pOutside);
	return 1 / (1 + Math.exp(outside - inside));
}

/** n ln p, where nothing seen of something impossible is no evidence: 0 · ln 0 = 0. */
function times(n: number, p: number): number {
	return n === 0 ? 0 : n * Math.log(p);
}
