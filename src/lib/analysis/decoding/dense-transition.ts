import { logSumExp } from '../statistics/log-sum-exp';
import type { Transition } from './transition';

/**
 * Sums are formed with the largest belief scaled to one, which is fast. A sum below this may have
 * lost terms to underflow and is formed again in logarithms.
 */
export const LEAST_LINEAR_SUM = 1e-280;

/**
 * A hidden walk with any transition matrix.
 * @param logRows ln A, row-major [from][to]; −∞ for a step that cannot be
 * @throws RangeError not square, or a row that does not sum to one within 1e-9
 * Cost: O(places²) per step.
 */
export function denseTransition(logRows: Float64Array): Transition {
	const places = Math.round(Math.sqrt(logRows.length));
	if (places * places !== logRows.length || places === 0) {
		throw new RangeError(`${logRows.length} numbers are no square matrix`);
	}
	for (let from = 0; from < places; from++) {
		const total = logSumExp(logRows.subarray(from * places, (from + 1) * places));
		if (!(Math.abs(total) < 1e-9)) {
			throw new RangeError(`row ${from} of the transition sums to ${Math.exp(total)}, not 1`);
		}
	}
	const logColumns = transposed(logRows, places);
	return {
		places,
		forward: summing(logColumns, places),
		backward: summing(logRows, places),
		best: (logScore, from) => {
			const before = logScore.slice();
			for (let to = 0; to < places; to++) {
				const column = to * places;
				let top = -Infinity;
				let at = 0;
				for (let x = 0; x < places; x++) {
					const value = before[x] + logColumns[column + x];
					if (value > top) {
						top = value;
						at = x;
					}
				}
				logScore[to] = top;
				from[to] = at;
			}
		}
	};
}

/** v(i) ← ln Σⱼ exp(m(i, j) + v(j)). */
function summing(logMatrix: Float64Array, places: number): (v: Float64Array) => void {
	const matrix = logMatrix.map(Math.exp);
	const scaled = new Float64Array(places);
	const before = new Float64Array(places);
	const terms = new Float64Array(places);
	return (v) => {
		before.set(v);
		let top = -Infinity;
		for (const value of v) if (value > top) top = value;
		if (top === -Infinity) return;
		for (let j = 0; j < places; j++) scaled[j] = Math.exp(before[j] - top);
		for (let i = 0; i < places; i++) {
			const row = i * places;
			let sum = 0;
			for (let j = 0; j < places; j++) sum += matrix[row + j] * scaled[j];
			if (sum >= LEAST_LINEAR_SUM) {
				v[i] = top + Math.log(sum);
				continue;
			}
			for (let j = 0; j < places; j++) terms[j] = logMatrix[row + j] + before[j];
			v[i] = logSumExp(terms);
		}
	};
}

function transposed(matrix: Float64Array, places: number): Float64Array {
	const out = new Float64Array(matrix.length);
	for (let i = 0; i < places; i++) {
		for (let j = 0; j < places; j++) out[j * places + i] = matrix[i * places + j];
	}
	return out;
}
