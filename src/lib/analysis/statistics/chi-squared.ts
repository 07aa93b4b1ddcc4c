import gammainc from '@stdlib/math-base-special-gammainc';
import gammaincinv from '@stdlib/math-base-special-gammaincinv';

/**
 * P(X ≤ x) of the chi-squared distribution; 0 for x ≤ 0.
 * @param freedom degrees of freedom, > 0, need not be whole
 * @throws RangeError freedom not above 0
 */
export function chiSquaredCdf(x: number, freedom: number): number {
	demandFreedom(freedom);
	return x > 0 ? gammainc(x / 2, freedom / 2) : x <= 0 ? 0 : NaN;
}

/** P(X > x) of the chi-squared distribution, without the loss of 1 − cdf in the tail. */
export function chiSquaredUpperTail(x: number, freedom: number): number {
	demandFreedom(freedom);
	return x > 0 ? gammainc(x / 2, freedom / 2, true, true) : x <= 0 ? 1 : NaN;
}

/**
 * The x below which a share p of the chi-squared distribution lies; 0 at 0, ∞ at 1.
 * @throws RangeError p outside [0, 1], freedom not above 0
 */
export function chiSquaredQuantile(p: number, freedom: number): number {
	demandFreedom(freedom);
	if (!(p >= 0 && p <= 1)) throw new RangeError(`probability ${p} is outside 0 to 1`);
	return 2 * gammaincinv(p, freedom / 2);
}

function demandFreedom(freedom: number): void {
	if (!(freedom > 0)) throw new RangeError(`degrees of freedom must be above 0: ${freedom}`);
}
