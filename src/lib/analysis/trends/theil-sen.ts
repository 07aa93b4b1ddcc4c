import { normalQuantile } from '../statistics/normal';
import { median, quantileSorted } from '../statistics/quantile';
import { tieTerm } from './tie-term';

/** A straight line through the middle of a series; NaN where there is none. */
export interface TheilSen {
	/** Change of y a day. */
	readonly slope: number;
	/** y on day 0. */
	readonly intercept: number;
	/** Limits of the slope. */
	readonly low: number;
	readonly high: number;
	/** Days used. */
	readonly n: number;
}

/**
 * Slope and intercept of Theil (1950) and Sen (1968): the median of all slopes between two days, and
 * median y − slope · median day. Real day numbers stand for the days, so missing days need no care.
 * Limits of the slope are order statistics after Sen, normal approximation with tie correction.
 * Days whose y is NaN are left out; a day that occurs twice gives no slope with itself.
 * @param days  day numbers, any order
 * @param y     one value a day
 * @param level of the limits, in (0, 1)
 * @returns NaN slope, intercept and limits with fewer than two different days
 * @throws RangeError lengths differ, level out of range
 * Cost: O(n² log n).
 */
export function theilSen(days: ArrayLike<number>, y: ArrayLike<number>, level = 0.95): TheilSen {
	if (days.length !== y.length)
		throw new RangeError(`lengths differ: ${days.length} and ${y.length}`);
	if (!(level > 0 && level < 1)) throw new RangeError(`level ${level} is outside 0 to 1`);
	const kept = [...Array(y.length).keys()].filter((i) => Number.isFinite(y[i]));
	const x = Float64Array.from(kept, (i) => days[i]);
	const v = Float64Array.from(kept, (i) => y[i]);
	const n = kept.length;
	const slopes = new Float64Array((n * (n - 1)) / 2);
	let count = 0;
	for (let i = 0; i < n; i++) {
		for (let j = i + 1; j < n; j++) {
			if (x[i] !== x[j]) slopes[count++] = (v[j] - v[i]) / (x[j] - x[i]);
		}
	}
	if (count === 0) return { slope: NaN, intercept: NaN, low: NaN, high: NaN, n };
	const sorted = slopes.subarray(0, count).sort();
	const slope = quantileSorted(sorted, 0.5);
	const spread = (n * (n - 1) * (2 * n + 5) - tieTerm(x) - tieTerm(v)) / 18;
	const reach = normalQuantile((1 + level) / 2) * Math.sqrt(Math.max(0, spread));
	return {
		slope,
		intercept: median(v) - slope * median(x),
		low: sorted[Math.max(Math.round((count - reach) / 2) - 1, 0)],
		high: sorted[Math.min(Math.round((count + reach) / 2), count - 1)],
		n
	};
}
