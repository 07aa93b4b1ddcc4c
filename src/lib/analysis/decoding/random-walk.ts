import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { gridSteps, lineLogWeights } from './walk-weights';

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
	const rows = lineLogWeights(bins, bin, metric, sigmaCm).map(Math.exp);
	for (let from = 0; from < places; from++) {
		const row = rows.subarray(from * places, (from + 1) * places);
		let sum = 0;
		for (const weight of row) sum += weight;
		for (let to = 0; to < places; to++) row[to] /= sum;
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
	const { spread, rowSum } = gridSteps(bins, bin, sigmaCm);
	const grid = new Float64Array(bins.count);
	return (belief) => {
		grid.fill(0);
		for (let p = 0; p < bin.length; p++) grid[bin[p]] = belief[p] / rowSum[bin[p]];
		spread(grid, grid);
		for (let p = 0; p < bin.length; p++) belief[p] = grid[bin[p]];
	};
}
