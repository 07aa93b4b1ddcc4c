import type { Arena } from '../arena/arena';
import type { Bins } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { CUT_SIGMAS, gaussianKernel } from './gaussian-kernel';
import type { Separable } from './separable';
import { gridSmoother, lineSmoother, type EdgeRule } from './smooth-line';

/** Smooths one map: reads `from`, writes `to`; both have one value per bin and may be the same. */
export interface Smoother {
	(from: Float64Array, to: Float64Array): void;
	/** What it does in the compiled kernel's terms, where it can be said so. */
	readonly separable?: Separable;
}

/**
 * Gaussian smoothing over the bins of an arena, cut at 4 σ.
 * Lines and grids: separable convolution; a ring always wraps, elsewhere `edge` says what lies
 * outside. Trees: weights by distance along the maze, nothing outside (`edge` has no meaning);
 * they are not normalised, which a ratio of two smoothed maps does not notice.
 * @param sigmaCm 0 for no smoothing
 * @throws RangeError sigmaCm negative or not finite
 */
export function smootherOf(arena: Arena, bins: Bins, sigmaCm: number, edge: EdgeRule): Smoother {
	const weights = gaussianKernel(sigmaCm / bins.binCm);
	if (arena.kind === 'tree' && weights.length > 1) return treeSmoother(arena, bins, sigmaCm);
	const smooth = separableSmoother(bins, weights, edge);
	if (edge !== 'zero' && !bins.isRing) return smooth;
	const { binsX, binsY, isRing } = bins;
	return Object.assign(smooth, { separable: { binsX, binsY, weights, isRing } });
}

function separableSmoother(bins: Bins, weights: Float64Array, edge: EdgeRule): Smoother {
	if (weights.length === 1) return (from, to) => void to.set(from);
	if (bins.dimensions === 2) return gridSmoother(bins.binsX, bins.binsY, weights, edge);
	const line = { count: bins.binsX, lines: 1, stride: 1, between: 0 };
	return lineSmoother(line, weights, bins.isRing ? 'wrap' : edge);
}

function treeSmoother(arena: Arena, bins: Bins, sigmaCm: number): Smoother {
	const metric = metricOf(arena);
	const { count, centreXCm } = bins;
	const neighbours: { bins: Int32Array; weights: Float64Array }[] = [];
	for (let k = 0; k < count; k++) {
		const near: number[] = [];
		const weights: number[] = [];
		for (let j = 0; j < count; j++) {
			const distance = metric(centreXCm[k], NaN, centreXCm[j], NaN);
			if (distance > CUT_SIGMAS * sigmaCm) continue;
			near.push(j);
			weights.push(Math.exp(-((distance / sigmaCm) ** 2) / 2));
		}
		neighbours.push({ bins: Int32Array.from(near), weights: Float64Array.from(weights) });
	}
	const copy = new Float64Array(count);
	return (from, to) => {
		copy.set(from);
		for (let k = 0; k < count; k++) {
			const { bins: near, weights } = neighbours[k];
			let sum = 0;
			for (let j = 0; j < near.length; j++) sum += weights[j] * copy[near[j]];
			to[k] = sum;
		}
	};
}
