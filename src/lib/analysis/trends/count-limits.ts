import { negativeBinomialAtLeast, negativeBinomialAtMost } from '../statistics/negative-binomial';
import { poissonAtLeast, poissonAtMost } from '../statistics/poisson';
import { smallestCount } from '../statistics/smallest-count';

/** Counts so low or so high that chance would rarely give them. */
export interface CountLimits {
	/** Largest L with P(X ≤ L) ≤ α/2; null when even 0 is too likely to alarm. */
	readonly atOrBelow: number | null;
	/** Smallest U with P(X ≥ U) ≤ α/2. */
	readonly atOrAbove: number;
	/** Exact chances of the two alarms. */
	readonly pLow: number;
	readonly pHigh: number;
}

/**
 * Exact control limits of one day's count. Small bundles cannot alarm low on a single day: no lower
 * limit exists when P(0) > α/2.
 * @param mean  > 0
 * @param alpha chance of either alarm, in (0, 1)
 * @param size  of a negative binomial count with variance mean + mean²/size; ∞ (default) is Poisson
 * @throws RangeError mean, alpha or size out of range
 */
export function countLimits(mean: number, alpha: number, size = Infinity): CountLimits {
	if (!(mean > 0)) throw new RangeError(`mean must be above 0: ${mean}`);
	if (!(alpha > 0 && alpha < 1)) throw new RangeError(`alpha ${alpha} is outside 0 to 1`);
	const isPoisson = size === Infinity;
	const atMost = (k: number) =>
		isPoisson ? poissonAtMost(k, mean) : negativeBinomialAtMost(k, mean, size);
	const atLeast = (k: number) =>
		isPoisson ? poissonAtLeast(k, mean) : negativeBinomialAtLeast(k, mean, size);
	const below = smallestCount((k) => atMost(k) > alpha / 2) - 1;
	const above = smallestCount((k) => atLeast(k) <= alpha / 2);
	return {
		atOrBelow: below >= 0 ? below : null,
		atOrAbove: above,
		pLow: below >= 0 ? atMost(below) : 0,
		pHigh: atLeast(above)
	};
}
