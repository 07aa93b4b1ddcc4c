import gammainc from '@stdlib/math-base-special-gammainc';
import gammaln from '@stdlib/math-base-special-gammaln';

/**
 * ln P(X = k) of a Poisson count; −∞ where k cannot occur.
 * @param mean ≥ 0; at mean 0 only k = 0 occurs
 * @throws RangeError mean negative or not finite
 */
export function poissonLogPmf(k: number, mean: number): number {
	demandMean(mean);
	if (!(k >= 0) || !Number.isInteger(k)) return Number.isNaN(k) ? NaN : -Infinity;
	if (mean === 0) return k === 0 ? 0 : -Infinity;
	return k * Math.log(mean) - mean - gammaln(k + 1);
}

/** P(X ≤ k) of a Poisson count; k need not be whole, 0 below 0. */
export function poissonAtMost(k: number, mean: number): number {
	demandMean(mean);
	const whole = Math.floor(k);
	if (whole < 0 || mean === 0) return whole < 0 ? 0 : 1;
	return gammainc(mean, whole + 1, true, true);
}

/** P(X ≥ k) of a Poisson count, without the loss of 1 − P(X ≤ k − 1) in the tail. */
export function poissonAtLeast(k: number, mean: number): number {
	demandMean(mean);
	const whole = Math.ceil(k);
	if (whole <= 0 || mean === 0) return whole <= 0 ? 1 : 0;
	return gammainc(mean, whole);
}

function demandMean(mean: number): void {
	if (!(mean >= 0 && mean < Infinity)) throw new RangeError(`mean must be finite, ≥ 0: ${mean}`);
}
