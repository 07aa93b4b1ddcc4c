/** Slower than this is not running, cm/s (common practice; laboratories use 2 to 10). */
export const LEAST_SPEED_CM_S = 5;

/** A run of n equal steps may add up to a rounding error less than n steps. */
const SLACK_S = 1e-9;

/**
 * The samples in which the animal ran: speed at least `leastCmS`, in runs that last at least
 * `leastRunS` on the clock.
 * @param speedCmS  NaN where undefined; breaks a run
 * @param standS    how long each sample stands
 * @param stretch   stretch of each sample, −1 for none; a run never spans two
 * @param leastRunS 0 to keep every fast sample; half a second is usual
 * @returns 1 for kept samples, and the seconds they stand together
 * @throws RangeError leastCmS or leastRunS negative
 * Cost: O(n).
 */
export function movingSamples(
	speedCmS: Float64Array,
	standS: Float64Array,
	stretch: Int32Array,
	leastCmS = LEAST_SPEED_CM_S,
	leastRunS = 0
): { isKept: Uint8Array; keptS: number } {
	if (!(leastCmS >= 0)) throw new RangeError(`least speed must be 0 or more, got ${leastCmS}`);
	if (!(leastRunS >= 0)) throw new RangeError(`least run must be 0 s or more, got ${leastRunS}`);
	const isKept = new Uint8Array(speedCmS.length);
	let keptS = 0;
	let first = 0;
	while (first < speedCmS.length) {
		let end = first;
		let runS = 0;
		while (
			end < speedCmS.length &&
			stretch[end] >= 0 &&
			stretch[end] === stretch[first] &&
			speedCmS[end] >= leastCmS
		) {
			runS += standS[end++];
		}
		if (end > first && runS >= leastRunS - SLACK_S) {
			isKept.fill(1, first, end);
			keptS += runS;
		}
		first = Math.max(end, first + 1);
	}
	return { isKept, keptS };
}
