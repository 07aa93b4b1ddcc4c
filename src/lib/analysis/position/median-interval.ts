import { median } from '../statistics/quantile';

/** Median time between neighbouring samples, s; NaN with fewer than two. */
export function medianInterval(tS: Float64Array): number {
	const steps = new Float64Array(Math.max(0, tS.length - 1));
	for (let i = 0; i < steps.length; i++) steps[i] = tS[i + 1] - tS[i];
	return median(steps);
}
