import type { Bins } from '../arena/bins';
import { logSumExp } from '../statistics/log-sum-exp';
import { LEAST_LINEAR_SUM } from './dense-transition';
import type { Transition } from './transition';
import { gridSteps } from './walk-weights';

/**
 * Random walk over the places of a grid, cut at 4 σ along each axis. Sums are two passes of a
 * one-dimensional Gaussian, and so are maxima: the largest of v − dx²/2σ² − dy²/2σ² is found along
 * rows first and along columns of what they found then (Felzenszwalb and Huttenlocher 2012).
 * @param bin     places, as bins of the arena, ascending
 * @param sigmaCm above 0
 * Cost: O(bins · kernel) per step.
 */
export function gridTransition(bins: Bins, bin: Int32Array, sigmaCm: number): Transition {
	const { weights, spread, rowSum } = gridSteps(bins, bin, sigmaCm);
	const logWeights = weights.map(Math.log);
	const reach = (weights.length - 1) / 2;
	const { binsX, binsY, count } = bins;
	const logRowSum = Float64Array.from(bin, (k) => Math.log(rowSum[k]));
	const placeOfBin = new Int32Array(count).fill(-1);
	bin.forEach((k, place) => (placeOfBin[k] = place));
	const logs = new Float64Array(count);
	const grid = new Float64Array(count);
	const lay = (v: Float64Array) => {
		logs.fill(-Infinity);
		bin.forEach((k, place) => (logs[k] = v[place]));
	};

	/** v(x) ← ln Σ exp(v(x′)) w(x − x′). */
	const blur = (v: Float64Array) => {
		let top = -Infinity;
		for (const value of v) if (value > top) top = value;
		if (top === -Infinity) return;
		lay(v);
		for (let k = 0; k < count; k++) grid[k] = Math.exp(logs[k] - top);
		spread(grid, grid);
		bin.forEach((k, place) => {
			v[place] = grid[k] >= LEAST_LINEAR_SUM ? top + Math.log(grid[k]) : exactAt(k);
		});
	};
	const terms = new Float64Array(weights.length ** 2);
	const exactAt = (k: number): number => {
		terms.fill(-Infinity);
		let used = 0;
		const column = k % binsX;
		const row = Math.floor(k / binsX);
		for (let y = Math.max(0, row - reach); y <= Math.min(binsY - 1, row + reach); y++) {
			for (let x = Math.max(0, column - reach); x <= Math.min(binsX - 1, column + reach); x++) {
				terms[used++] =
					logs[y * binsX + x] + logWeights[x - column + reach] + logWeights[y - row + reach];
			}
		}
		return logSumExp(terms);
	};

	const alongX = new Float64Array(count);
	const fromX = new Int32Array(count);
	const fromY = new Int32Array(count);
	return {
		places: bin.length,
		forward: (v) => {
			for (let p = 0; p < v.length; p++) v[p] -= logRowSum[p];
			blur(v);
		},
		backward: (v) => {
			blur(v);
			for (let p = 0; p < v.length; p++) v[p] -= logRowSum[p];
		},
		best: (v, from) => {
			lay(v.map((value, p) => value - logRowSum[p]));
			const rows = { count: binsX, lines: binsY, stride: 1, between: binsX };
			const columns = { count: binsY, lines: binsX, stride: binsX, between: 1 };
			largest(logs, alongX, fromX, rows, logWeights);
			largest(alongX, grid, fromY, columns, logWeights);
			bin.forEach((k, place) => {
				v[place] = grid[k];
				from[place] = Math.max(0, placeOfBin[fromX[fromY[k]]]);
			});
		}
	};
}

/** Largest of value + log weight within reach on every line, and the bin it came from. */
function largest(
	values: Float64Array,
	out: Float64Array,
	from: Int32Array,
	lay: { count: number; lines: number; stride: number; between: number },
	logWeights: Float64Array
): void {
	const reach = (logWeights.length - 1) / 2;
	for (let line = 0; line < lay.lines; line++) {
		for (let k = 0; k < lay.count; k++) {
			const at = line * lay.between + k * lay.stride;
			out[at] = -Infinity;
			from[at] = at;
			const last = Math.min(lay.count - 1, k + reach);
			for (let j = Math.max(0, k - reach); j <= last; j++) {
				const other = line * lay.between + j * lay.stride;
				const value = values[other] + logWeights[j - k + reach];
				if (value > out[at]) {
					out[at] = value;
					from[at] = other;
				}
			}
		}
	}
}
