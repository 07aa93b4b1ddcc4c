import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { gaussianKernel } from '../maps/gaussian-kernel';
import { gridSmoother } from '../maps/smooth-line';

/** Carries a belief over places one step on: reads and writes one probability per place. */
export type Walk = (belief: Float64Array) => void;

/**
 * Random walk of the animal between windows: A(x, x′) ∝ exp(−d(x, x′)²/2σ²), d along the track, ring
 * or maze, in a straight line in the open; each row renormalised over the places that can be
 * answered, so nothing leaks out at ends and walls.
 * @param bin     places, as bins of the arena
 * @param sigmaCm above 0
 * Cost: O(places²) once and per step on tracks; on a grid a separable convolution, cut at 4 σ.
 */
export function randomWalk(bins: Bins, bin: Int32Array, metric: Metric, sigmaCm: number): Walk {
	return bins.dimensions === 2
		? gridWalk(bins, bin, sigmaCm)
		: lineWalk(bins, bin, metric, sigmaCm);
}

function lineWalk(bins: Bins, bin: Int32Array, metric: Metric, sigmaCm: number): Walk {
	const places = bin.length;
	const rows = new Float64Array(places * places);
	for (let from = 0; from < places; from++) {
		let sum = 0;
		for (let to = 0; to < places; to++) {
			const d = metric(bins.centreXCm[bin[from]], NaN, bins.centreXCm[bin[to]], NaN) / sigmaCm;
			rows[from * places + to] = Math.exp(-(d * d) / 2);
			sum += rows[from * places + to];
		}
		for (let to = 0; to < places; to++) rows[from * places + to] /= sum;
	}
	const next = new Float64Array(places);
	return (belief) => {
		next.fill(0);
		for (let from = 0; from < places; from++) {
			const weight = belief[from];
			if (weight === 0) continue;
			for (let to = 0; to < places; to++) next[to] += weight * rows[from * places + to];
		}
		belief.set(next);
	};
}

function gridWalk(bins: Bins, bin: Int32Array, sigmaCm: number): Walk {
	const weights = gaussianKernel(sigmaCm / bins.binCm);
	const spread = gridSmoother(bins.binsX, bins.binsY, weights, 'zero');
	const rowSum = new Float64Array(bins.count);
	for (const k of bin) rowSum[k] = 1;
	spread(rowSum, rowSum);
	const grid = new Float64Array(bins.count);
	return (belief) => {
		grid.fill(0);
		for (let p = 0; p < bin.length; p++) grid[bin[p]] = belief[p] / rowSum[bin[p]];
		spread(grid, grid);
		for (let p = 0; p < bin.length; p++) belief[p] = grid[bin[p]];
	};
}
