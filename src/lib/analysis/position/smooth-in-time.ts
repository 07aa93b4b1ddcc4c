import { CUT_SIGMAS } from '../maps/gaussian-kernel';
import { unbrokenRuns } from './unbroken-runs';

/** Standard deviation in time, s (common practice). */
export const SMOOTH_TIME_S = 0.15;

/** Keeps the weights even on both sides when 4 σ is a whole number of samples. */
const SLACK_S = 1e-9;

/**
 * Gaussian smoothing in time inside each unbroken run: every sample becomes the mean of the run's
 * samples within 4 σ, weighted exp(−Δt²/2σ²) by their real times. The weights are divided by their
 * sum, so that the ends of a run are not drawn towards zero (they lean inward instead).
 * Smooth x and y before linearising; on a ring hand in the unwrapped distance (`onUnwrapped`).
 * @param tS      ascending
 * @param values  NaN where unknown; stays NaN
 * @param stretch stretch of each sample, −1 for none; their samples stay as they are
 * @param sigmaS  0 for no smoothing
 * @returns new array
 * @throws RangeError sigmaS negative or not finite
 * Cost: O(n · samples in 4 σ).
 */
export function smoothInTime(
	tS: Float64Array,
	values: Float64Array,
	stretch: Int32Array,
	sigmaS = SMOOTH_TIME_S
): Float64Array {
	if (!(sigmaS >= 0 && Number.isFinite(sigmaS))) {
		throw new RangeError(`smoothing must be 0 s or more, got ${sigmaS}`);
	}
	const out = values.slice();
	if (sigmaS === 0) return out;
	const reachS = CUT_SIGMAS * sigmaS + SLACK_S;
	const sums = new Float64Array(values.length);
	const weights = new Float64Array(values.length).fill(1);
	for (const { first, end } of unbrokenRuns(values, stretch)) {
		for (let i = first; i < end; i++) {
			// A pair has one weight; each of the two leans towards the other by it.
			for (let k = i + 1; k < end && tS[k] - tS[i] <= reachS; k++) {
				const away = (tS[k] - tS[i]) / sigmaS;
				const weight = Math.exp(-0.5 * away * away);
				const lean = weight * (values[k] - values[i]);
				sums[i] += lean;
				sums[k] -= lean;
				weights[i] += weight;
				weights[k] += weight;
			}
			out[i] = values[i] + sums[i] / weights[i];
		}
	}
	return out;
}
