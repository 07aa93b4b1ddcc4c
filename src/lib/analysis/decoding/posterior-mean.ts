import type { Arena } from '../arena/arena';
import type { Bins } from '../arena/bins';
import { mod } from '../arena/ring';

/**
 * Mean of a posterior, cm: the estimate of least squared error, beside the most probable bin. On a
 * ring the circular mean, arg Σ p e^{2πix/C}, in [0, C).
 * @param probabilities one per bin of the arena (0 where it cannot be answered), any positive sum
 * @returns y is NaN in one dimension. Both are NaN where a mean has no meaning: on a branched maze,
 *   whose axis jumps from branch to branch, on a ring when all directions cancel, and for a sum of 0.
 *   On a polyline it is a place along the track.
 * @throws RangeError not one probability per bin
 * Cost: O(bins).
 */
export function posteriorMean(
	probabilities: ArrayLike<number>,
	bins: Bins,
	arena: Arena
): { xCm: number; yCm: number } {
	if (probabilities.length !== bins.count) {
		throw new RangeError(`${probabilities.length} probabilities for ${bins.count} bins`);
	}
	if (arena.kind === 'tree') return { xCm: NaN, yCm: NaN };
	if (arena.kind === 'ring') {
		return { xCm: circularMean(probabilities, bins.centreXCm, arena.lengthCm), yCm: NaN };
	}
	let total = 0;
	let x = 0;
	let y = 0;
	for (let k = 0; k < bins.count; k++) {
		total += probabilities[k];
		x += probabilities[k] * bins.centreXCm[k];
		y += probabilities[k] * bins.centreYCm[k];
	}
	return total > 0 ? { xCm: x / total, yCm: y / total } : { xCm: NaN, yCm: NaN };
}

/** A resultant this short, as a share of the sum, is rounding. */
const CANCELLED = 1e-12;

function circularMean(weights: ArrayLike<number>, xCm: Float64Array, lengthCm: number): number {
	let total = 0;
	let cosines = 0;
	let sines = 0;
	for (let k = 0; k < weights.length; k++) {
		const angle = (2 * Math.PI * xCm[k]) / lengthCm;
		total += weights[k];
		cosines += weights[k] * Math.cos(angle);
		sines += weights[k] * Math.sin(angle);
	}
	if (!(Math.hypot(cosines, sines) > CANCELLED * total)) return NaN;
	return mod((lengthCm * Math.atan2(sines, cosines)) / (2 * Math.PI), lengthCm);
}
