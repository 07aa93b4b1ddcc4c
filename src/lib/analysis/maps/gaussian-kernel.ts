/** Kernels are cut at this many standard deviations. */
export const CUT_SIGMAS = 4;

/**
 * Discrete Gaussian w_j ∝ exp(−j²/2σ²), |j| ≤ r = floor(4σ + 0.5), summing to one.
 * @param sigmaBins standard deviation in bins, 0 for no smoothing
 * @returns weights −r … r, length 2r + 1
 * @throws RangeError sigmaBins negative or not finite
 */
export function gaussianKernel(sigmaBins: number): Float64Array {
	if (!(sigmaBins >= 0 && Number.isFinite(sigmaBins))) {
		throw new RangeError(`smoothing must be 0 bins or more, got ${sigmaBins}`);
	}
	const reach = Math.floor(CUT_SIGMAS * sigmaBins + 0.5);
	if (reach === 0) return Float64Array.of(1);
	const weights = Float64Array.from({ length: 2 * reach + 1 }, (_, k) =>
		Math.exp(-((k - reach) ** 2) / (2 * sigmaBins * sigmaBins))
	);
	const sum = weights.reduce((total, weight) => total + weight, 0);
	return weights.map((weight) => weight / sum);
}
