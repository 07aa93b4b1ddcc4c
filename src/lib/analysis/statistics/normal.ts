import erfc from '@stdlib/math-base-special-erfc';
import erfcinv from '@stdlib/math-base-special-erfcinv';

/** Density of the standard normal distribution at z. */
export function normalDensity(z: number): number {
	return Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
}

/** P(Z ≤ z) of the standard normal distribution; exact in the far left tail too. */
export function normalCdf(z: number): number {
	return 0.5 * erfc(-z / Math.SQRT2);
}

/** P(Z > z) of the standard normal distribution, without the loss of 1 − cdf in the tail. */
export function normalUpperTail(z: number): number {
	return 0.5 * erfc(z / Math.SQRT2);
}

/**
 * The z below which a share p of the standard normal distribution lies; ∓∞ at 0 and 1.
 * @throws RangeError p outside [0, 1]
 */
export function normalQuantile(p: number): number {
	if (!(p >= 0 && p <= 1)) throw new RangeError(`probability ${p} is outside 0 to 1`);
	return -Math.SQRT2 * erfcinv(2 * p);
}
