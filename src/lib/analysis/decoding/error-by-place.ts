import { quantileSorted } from '../statistics/quantile';

/** Errors by where the animal was, one value per cell; NaN where it never was. */
export interface ErrorByPlace {
	readonly windows: Int32Array;
	readonly medianCm: Float64Array;
	/** 25th and 75th percentile (type 7). */
	readonly lowerQuartileCm: Float64Array;
	readonly upperQuartileCm: Float64Array;
}

/**
 * Median and quartiles of the error in every cell: a bin, or a stretch of several where bins hold
 * few windows.
 * @param errorCm error of each window; NaN is left out
 * @param cell    cell of each window, −1 is left out
 * @throws RangeError lengths differ
 * Cost: O(windows · log windows).
 */
export function errorByPlace(errorCm: Float64Array, cell: Int32Array, cells: number): ErrorByPlace {
	if (errorCm.length !== cell.length) {
		throw new RangeError(`lengths differ: ${errorCm.length} and ${cell.length}`);
	}
	const isUsed = (w: number) => cell[w] >= 0 && !Number.isNaN(errorCm[w]);
	const windows = new Int32Array(cells);
	for (let w = 0; w < cell.length; w++) if (isUsed(w)) windows[cell[w]]++;
	const errors = Array.from(windows, (count) => new Float64Array(count));
	const next = new Int32Array(cells);
	for (let w = 0; w < cell.length; w++)
		if (isUsed(w)) errors[cell[w]][next[cell[w]]++] = errorCm[w];
	for (const list of errors) list.sort();
	const at = (q: number) => Float64Array.from(errors, (list) => quantileSorted(list, q));
	return { windows, medianCm: at(0.5), lowerQuartileCm: at(0.25), upperQuartileCm: at(0.75) };
}
