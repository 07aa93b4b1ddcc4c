import { unwrapRing } from '../arena/ring';
import { unbrokenRuns } from './unbroken-runs';

/** Direction is read over this long, half of it each way, s (common practice). */
const READ_OVER_S = 0.5;
/** Clock times are sums of steps that binary fractions do not hold exactly. */
const SLACK_S = 1e-9;

/**
 * Which way the animal runs on a ring: the sign of the net way between the first and last sample
 * within half of `overS` of each sample, clipped to its unbroken run.
 * @param xCm     distance along the ring, NaN where unknown
 * @param stretch stretch of each sample, −1 for none
 * @returns +1 with growing distance, −1 against it, 0 for no net way or an unknown place
 * @throws RangeError overS not above 0
 * Cost: O(n).
 */
export function ringDirection(
	tS: Float64Array,
	xCm: Float64Array,
	stretch: Int32Array,
	lengthCm: number,
	overS = READ_OVER_S
): Int8Array {
	if (!(overS > 0)) throw new RangeError(`direction must be read over some time, got ${overS} s`);
	const reachS = overS / 2 + SLACK_S;
	const out = new Int8Array(xCm.length);
	for (const { first, end } of unbrokenRuns(xCm, stretch)) {
		const run = unwrapRing(xCm.subarray(first, end), lengthCm);
		let low = first;
		let high = first;
		for (let i = first; i < end; i++) {
			while (tS[i] - tS[low] > reachS) low++;
			while (high + 1 < end && tS[high + 1] - tS[i] <= reachS) high++;
			out[i] = Math.sign(run[high - first] - run[low - first]);
		}
	}
	return out;
}
