import betainc from '@stdlib/math-base-special-betainc';
import gammaln from '@stdlib/math-base-special-gammaln';

/**
 * ln P(X = k) of a negative binomial count with mean μ and size r: variance μ + μ²/r.
 * @param mean μ ≥ 0
 * @param size r > 0, need not be whole
 * @returns −∞ where k cannot occur
 * @throws RangeError mean negative, size not above 0
 */
export function negativeBinomialLogPmf(k: number, mean: number, size: number): number {
	demand(mean, size);
	if (Number.isNaN(k)) return NaN;
	if (!Number.isInteger(k) || k < 0) return -Infinity;
	const counted = k === 0 ? 0 : k * (Math.log(mean) - Math.log(size + mean));
	return (
		gammaln(k + size) - gammaln(k + 1) - gammaln(size) - size * Math.log1p(mean / size) + counted
	);
}

/** P(X ≤ k) of a negative binomial count with mean μ and size r. */
export function negativeBinomialAtMost(k: number, mean: number, size: number): number {
	demand(mean, size);
	const whole = Math.floor(k);
	return whole < 0 ? 0 : betainc(size / (size + mean), size, whole + 1);
}

/** P(X ≥ k) of a negative binomial count, without the loss of 1 − P(X ≤ k − 1) in the tail. */
export function negativeBinomialAtLeast(k: number, mean: number, size: number): number {
	demand(mean, size);
	const whole = Math.ceil(k);
	return whole <= 0 ? 1 : betainc(mean / (size + mean), whole, size);
}

function demand(mean: number, size: number): void {
	if (!(mean >= 0 && mean < Infinity)) throw new RangeError(`mean must be finite, ≥ 0: ${mean}`);
	if (!(size > 0 && size < Infinity)) throw new RangeError(`size must be finite, > 0: ${size}`);
}
