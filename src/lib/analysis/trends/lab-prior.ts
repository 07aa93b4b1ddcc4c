import { PRIOR, type Baseline } from './bundle-baseline';

/** Fewer bundles than this say too little of how bundles differ. */
const LEAST_BUNDLES = 10;
/** What the pool may weigh, in units and in days: no less than the first prior, and never so much
    that a bundle's own eight days are not heard. */
const UNITS = { low: 10, high: 60 };
const DAYS = { low: 1.5, high: 8 };

/**
 * Prior of a lab from the baselines that its own bundles have taught, in place of the first guess:
 * Beta of survival and Gamma of arrivals with the pooled means, and as wide as the bundles differ
 * beyond chance (empirical Bayes by moments).
 * @param baselines learnt from the first prior, one a bundle and resting place
 * @returns the first prior with fewer than ten bundles
 */
export function labPrior(baselines: readonly Baseline[]): Baseline {
	if (baselines.length < LEAST_BUNDLES) return PRIOR;
	const own = baselines.map(({ kept, lost, fresh, days }) => ({
		stayed: kept - PRIOR.kept,
		trials: kept + lost - PRIOR.kept - PRIOR.lost,
		fresh: fresh - PRIOR.fresh,
		days: days - PRIOR.days
	}));
	const survival = pool(
		own.map(({ stayed, trials }) => [stayed, trials]),
		(m) => m * (1 - m)
	);
	const units = within(
		(survival.mean * (1 - survival.mean)) / survival.between - 1,
		UNITS.low,
		UNITS.high
	);
	const arrivals = pool(
		own.map((one) => [one.fresh, one.days]),
		(m) => m
	);
	const days = within(arrivals.mean / arrivals.between, DAYS.low, DAYS.high);
	return {
		...PRIOR,
		kept: survival.mean * units,
		lost: (1 - survival.mean) * units,
		fresh: arrivals.mean * days,
		days
	};
}

/**
 * Pooled rate, and the variance between the bundles' rates beyond what counting gives.
 * @param parts    count and exposure of each bundle; those without exposure are left out
 * @param variance of one count per exposure at a given mean
 */
function pool(
	parts: readonly (readonly [number, number])[],
	variance: (mean: number) => number
): { mean: number; between: number } {
	const seen = parts.filter(([, exposure]) => exposure > 0);
	const exposures = seen.reduce((sum, [, exposure]) => sum + exposure, 0);
	const mean = seen.reduce((sum, [count]) => sum + count, 0) / exposures;
	let square = 0;
	let chance = 0;
	for (const [count, exposure] of seen) {
		square += (count / exposure - mean) ** 2 / seen.length;
		chance += variance(mean) / exposure / seen.length;
	}
	return { mean, between: Math.max(0, square - chance) };
}

/** Infinity (bundles that do not differ) becomes the highest weight. */
function within(value: number, low: number, high: number): number {
	return Math.min(high, Math.max(low, value));
}
