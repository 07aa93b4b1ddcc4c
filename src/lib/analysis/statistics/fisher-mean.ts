import { fisherZ } from './fisher-z';

/**
 * Mean of correlations by Fisher's transform, tanh(mean atanh r), r cut at ±0.999999. A correlation
 * over n points has variance 1/(n − 3) on that scale: with `points` given, the weights are n − 3.
 * @param points number of points behind each correlation; those with three or fewer weigh nothing
 * @returns NaN correlations are left out; NaN when none is left
 * @throws RangeError lengths differ
 */
export function fisherMean(correlations: ArrayLike<number>, points?: ArrayLike<number>): number {
	if (points && points.length !== correlations.length) {
		throw new RangeError(`lengths differ: ${correlations.length} and ${points.length}`);
	}
	let sum = 0;
	let weights = 0;
	for (let i = 0; i < correlations.length; i++) {
		const weight = points ? Math.max(0, points[i] - 3) : 1;
		if (Number.isNaN(correlations[i]) || !(weight > 0)) continue;
		sum += weight * fisherZ(correlations[i]);
		weights += weight;
	}
	return weights > 0 ? Math.tanh(sum / weights) : NaN;
}
