import { quantileSorted } from '../statistics/quantile';

/** Median time between neighbouring samples, s; NaN with fewer than two. */
export function medianInterval(tS: Float64Array): number {
	const steps = new Float64Array(Math.max(0, tS.length - 1));
	for (let i = 0; i < steps.length; i++) steps[i] = tS[i + 1] - tS[i];
	// The steps are ours: sorted in place, as a copy of a long recording would weigh.
	return quantileSorted(steps.sort(), 0.5);
}
