/**
 * Fisher information about position, per cm², of independent Poisson units: J = τ Σ f′²/f. An
 * unbiased estimate has variance of at least 1/J (Cramér–Rao).
 * @param rateHz       rate of each unit at the place, above 0
 * @param slopeHzPerCm its derivative along the axis, same length
 * @throws RangeError lengths differ
 */
export function fisherInformation(
	rateHz: ArrayLike<number>,
	slopeHzPerCm: ArrayLike<number>,
	windowS: number
): number {
	if (rateHz.length !== slopeHzPerCm.length) {
		throw new RangeError(`lengths differ: ${rateHz.length} and ${slopeHzPerCm.length}`);
	}
	let sum = 0;
	for (let u = 0; u < rateHz.length; u++) sum += (slopeHzPerCm[u] * slopeHzPerCm[u]) / rateHz[u];
	return windowS * sum;
}
