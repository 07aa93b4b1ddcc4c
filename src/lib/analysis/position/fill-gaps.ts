/** Gaps up to this long are filled, s (common practice). */
export const LONGEST_GAP_S = 0.5;

/** Clock times are sums of steps that binary fractions do not hold exactly. */
const SLACK_S = 1e-9;

/**
 * Fills gaps by a straight line in time between the two known samples around them, when these are
 * at most `longestGapS` apart. Longer gaps, and what lies before the first and after the last known
 * sample of a stretch, stay NaN: nothing is extrapolated, and such samples add no occupancy.
 * On a ring hand in the unwrapped distance (`onUnwrapped`).
 * @param values  NaN where unknown
 * @param stretch stretch of each sample, −1 for none; a gap never spans two
 * @returns new array
 * @throws RangeError longestGapS negative
 * Cost: O(n).
 */
export function fillGaps(
	tS: Float64Array,
	values: Float64Array,
	stretch: Int32Array,
	longestGapS = LONGEST_GAP_S
): Float64Array {
	if (!(longestGapS >= 0)) {
		throw new RangeError(`the longest gap must be 0 s or more, got ${longestGapS}`);
	}
	const out = values.slice();
	let last = -1;
	for (let i = 0; i < values.length; i++) {
		if (stretch[i] < 0) last = -1;
		if (Number.isNaN(values[i]) || stretch[i] < 0) continue;
		const gapS = last < 0 ? Infinity : tS[i] - tS[last];
		if (i > last + 1 && gapS <= longestGapS + SLACK_S && stretch[last] === stretch[i]) {
			const slope = (values[i] - values[last]) / gapS;
			for (let k = last + 1; k < i; k++) out[k] = values[last] + slope * (tS[k] - tS[last]);
		}
		last = i;
	}
	return out;
}
