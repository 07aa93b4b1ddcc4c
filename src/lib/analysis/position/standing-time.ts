/** A sample never stands longer than this, or three median intervals when that is longer. */
const LONGEST_S = 0.1;

/** The longest time one sample may stand for, s. */
export function longestStand(medianIntervalS: number): number {
	return Math.max(LONGEST_S, 3 * medianIntervalS);
}

/**
 * How long each sample stands: until the next of its stretch, at most `longestStand`; the last of
 * a stretch for the median interval. 0 outside every stretch, so no time is counted over a gap.
 * @param stretch stretch of each sample, −1 for none
 */
export function standingTime(
	tS: Float64Array,
	stretch: Int32Array,
	medianIntervalS: number
): Float64Array {
	const longestS = longestStand(medianIntervalS);
	const out = new Float64Array(tS.length);
	for (let i = 0; i < tS.length; i++) {
		if (stretch[i] < 0) continue;
		const hasNext = i + 1 < tS.length && stretch[i + 1] === stretch[i];
		out[i] = hasNext ? Math.min(tS[i + 1] - tS[i], longestS) : medianIntervalS;
	}
	return out;
}
