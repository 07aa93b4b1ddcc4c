import { logSumExp } from '../statistics/log-sum-exp';
import { negativeBinomialLogPmf } from '../statistics/negative-binomial';

/**
 * Bayesian online change points of counts (Adams and MacKay 2007): after each count the posterior of
 * the run length r, the number of counts since the last change. Counts between changes are Poisson
 * with a Gamma(shape, rate) mean, so the predictive is negative binomial; a change comes with the
 * same chance after every count.
 * @param counts whole, ≥ 0; NaN (no count that day) repeats the posterior before it
 * @param shape  > 0
 * @param rate   > 0, per unit of mean
 * @param hazard chance of a change after a count, in (0, 1)
 * @returns row t holds P(r = 0, 1 … ) after count t, one entry longer for each count seen
 * @throws RangeError shape, rate or hazard out of range
 * Cost: O(n²).
 */
export function runLengthPosterior(
	counts: ArrayLike<number>,
	shape: number,
	rate: number,
	hazard: number
): Float64Array[] {
	if (!(shape > 0 && rate > 0)) {
		throw new RangeError(`shape and rate must be above 0: ${shape}, ${rate}`);
	}
	if (!(hazard > 0 && hazard < 1)) throw new RangeError(`hazard ${hazard} is outside 0 to 1`);
	let logP = Float64Array.of(0);
	// Sum of the counts in the last r, for each r.
	let sums = Float64Array.of(0);
	const rows: Float64Array[] = [];
	for (let t = 0; t < counts.length; t++) {
		if (Number.isFinite(counts[t])) {
			const x = counts[t];
			const seen = logP.map((p, r) => {
				const size = shape + sums[r];
				return p + negativeBinomialLogPmf(x, size / (rate + r), size);
			});
			const total = logSumExp(seen);
			const grown = seen.map((p) => p - total + Math.log1p(-hazard));
			logP = Float64Array.of(Math.log(hazard), ...grown);
			sums = Float64Array.of(0, ...sums.map((sum) => sum + x));
		}
		rows.push(logP.map(Math.exp));
	}
	return rows;
}
