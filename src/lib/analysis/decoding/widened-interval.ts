import { normalCdf } from '../statistics/normal';
import { quantile } from '../statistics/quantile';
import { studentQuantile } from '../statistics/student-t';

/**
 * Percentile interval for few groups, widened as Student's t widens a normal one: between the
 * quantiles Φ(±√(n/(n − 1)) t) of the drawn figures, t of n − 1 degrees of freedom (Hesterberg
 * 2015, "expanded percentile"). The plain percentile interval takes the spread among n groups for
 * that among all there could be, and is too narrow: by 2 % at 30 groups and by a sixth at 10.
 * @param drawn  the figure of each bootstrap draw; NaN is left out
 * @param share  in (0, 1), such as 0.95
 * @param groups n, the laps or blocks that were drawn
 * @returns NaN, NaN with fewer than two groups or without draws
 * @throws RangeError share outside (0, 1)
 * Source: Hesterberg TC 2015 Am Stat 69:371. Cost: O(draws · log draws).
 */
export function widenedInterval(
	drawn: Float64Array,
	share: number,
	groups: number
): [number, number] {
	if (!(share > 0 && share < 1)) throw new RangeError(`share ${share} is not between 0 and 1`);
	if (groups < 2) return [NaN, NaN];
	const t = studentQuantile((1 - share) / 2, groups - 1);
	const tail = normalCdf(-Math.sqrt(groups / (groups - 1)) * t);
	return [quantile(drawn, tail), quantile(drawn, 1 - tail)];
}
