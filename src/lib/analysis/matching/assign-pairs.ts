import { munkres } from 'munkres';

/** Which rows go with which columns, each at most once. */
export interface Assignment {
	/** [row, column], rows ascending. */
	readonly pairs: readonly (readonly [number, number])[];
	readonly totalGain: number;
}

/**
 * One-to-one pairing with the largest total gain, gain = max(0, score − threshold); pairs that gain
 * nothing are dropped (Kuhn 1955). Taking the largest score first is not optimal.
 * @param scores    row-major [row][column]; −∞ for a pair that may not be made, never NaN
 * @param threshold 0 favours finding every match, 2 finding true ones
 * @throws RangeError scores do not fill rows × columns, or hold NaN
 * Cost: O(min(rows, columns)² · max(rows, columns)).
 */
export function assignPairs(
	scores: Float64Array,
	rows: number,
	columns: number,
	threshold: number
): Assignment {
	if (scores.length !== rows * columns) {
		throw new RangeError(`${scores.length} scores do not fill ${rows} × ${columns}`);
	}
	if (scores.some(Number.isNaN)) throw new RangeError('a score is not a number');
	if (rows === 0 || columns === 0) return { pairs: [], totalGain: 0 };
	const gains = scores.map((score) => Math.max(0, score - threshold));
	const costs = Array.from({ length: rows }, (_, r) =>
		gains.subarray(r * columns, (r + 1) * columns).map((gain) => -gain)
	);
	const pairs = munkres(costs)
		.filter(([row, column]) => gains[row * columns + column] > 0)
		.sort(([a], [b]) => a - b);
	const totalGain = pairs.reduce((sum, [row, column]) => sum + gains[row * columns + column], 0);
	return { pairs, totalGain };
}
