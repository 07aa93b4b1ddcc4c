import { chiSquaredUpperTail } from '../statistics/chi-squared';
import { mean as meanOf } from '../statistics/mean';

/** How far counts spread beside a Poisson count. */
export interface Dispersion {
	readonly mean: number;
	/** Divides by n − 1. */
	readonly variance: number;
	/** variance / mean. */
	readonly fano: number;
	/** Σ (y − m)²/m. */
	readonly chi2: number;
	/** P of at least this spread among Poisson counts of one mean. */
	readonly p: number;
	/** Negative binomial size by moments, m²/(v − m); ∞ (Poisson) when v ≤ m. */
	readonly size: number;
}

/**
 * Dispersion test of counts: Σ (y − m)²/m ~ χ² with n − 1 degrees of freedom if they are independent
 * Poisson counts of one mean. NaN counts are left out.
 * @returns NaN throughout (except the mean) with fewer than two counts; NaN chi2, p, fano at mean 0
 */
export function dispersion(counts: ArrayLike<number>): Dispersion {
	const y = Array.from(counts).filter(Number.isFinite);
	const mean = meanOf(y);
	if (y.length < 2) return { mean, variance: NaN, fano: NaN, chi2: NaN, p: NaN, size: NaN };
	const squares = y.reduce((sum, value) => sum + (value - mean) ** 2, 0);
	const variance = squares / (y.length - 1);
	const chi2 = squares / mean;
	return {
		mean,
		variance,
		fano: variance / mean,
		chi2,
		p: chiSquaredUpperTail(chi2, y.length - 1),
		size: variance > mean ? (mean * mean) / (variance - mean) : Infinity
	};
}
