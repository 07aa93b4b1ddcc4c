import type { NamedArray } from '$lib/schemas/named-arrays';
import { arrayOf } from './result-parts';

type Arrays = Map<string, NamedArray>;

/** A stretch of time as the posterior's picture needs it: one column a window, decoded or not. */
export interface DecodeStretch {
	startS: number;
	windows: number;
	/** Shade of each bin, window after window; NaN where nothing was decoded. */
	shade: Float32Array;
	/** Where the animal was in the middle of each window; NaN where it was not seen. */
	trueCm: Float32Array;
	/** Centre of the best bin; NaN where nothing was decoded. */
	decodedCm: Float32Array;
}

/** Only windows of running are decoded; in between, the path alone is shown. */
export function decodeStretch(
	arrays: Arrays,
	{ fromS, windows, windowS }: { fromS: number; windows: number; windowS: number },
	binCentresCm: ArrayLike<number>
): DecodeStretch {
	const bins = binCentresCm.length;
	const starts = arrayOf(arrays, 'startS');
	const decoded = arrayOf(arrays, 'decodedBin');
	const rowOfWindow = rows(arrayOf(arrays, 'window'));
	const all = arrayOf(arrays, 'shade');
	const shade = new Float32Array(windows * bins).fill(NaN);
	const decodedCm = new Float32Array(windows).fill(NaN);
	const trueCm = pathAt(arrays, fromS + windowS / 2, windowS, windows);
	for (let w = firstFrom(starts, fromS - windowS / 2); w < starts.length; w++) {
		const column = Math.round((starts[w] - fromS) / windowS);
		if (column >= windows) break;
		if (column < 0) continue;
		decodedCm[column] = binCentresCm[decoded[w]] ?? NaN;
		const row = rowOfWindow(w);
		if (row < 0) continue;
		shade.set(all.subarray(row * bins, (row + 1) * bins), column * bins);
	}
	return { startS: fromS, windows, shade, trueCm, decodedCm };
}

/** Start of the stretch of `spanS` that holds most windows. */
export function busiestS(startS: ArrayLike<number>, spanS: number): number {
	let best = 0;
	let most = 0;
	for (let first = 0, last = 0; first < startS.length; first++) {
		while (last < startS.length && startS[last] < startS[first] + spanS) last++;
		if (last - first > most) [best, most] = [first, last - first];
	}
	return startS[best] ?? 0;
}

/** Row of a window's posterior; long recordings keep every k-th. */
export function rows(kept: ArrayLike<number>): (window: number) => number {
	const every = kept.length > 1 ? kept[1] : 1;
	return (window) => {
		const row = window / every;
		return Number.isInteger(row) && row < kept.length ? row : -1;
	};
}

/** Index of the first value at or after `from` in ascending values. */
export function firstFrom(values: ArrayLike<number>, from: number): number {
	let low = 0;
	let high = values.length;
	while (low < high) {
		const mid = (low + high) >> 1;
		if (values[mid] < from) low = mid + 1;
		else high = mid;
	}
	return low;
}

/** Samples farther than this from a moment do not tell where the animal was then. */
const NEAR_S = 0.2;

function pathAt(arrays: Arrays, fromS: number, stepS: number, count: number): Float32Array {
	const zero = arrayOf(arrays, 'fromS')[0];
	const after = arrayOf(arrays, 'afterS');
	const x = arrayOf(arrays, 'xCm');
	return Float32Array.from({ length: count }, (_, k) => {
		const at = fromS + k * stepS - zero;
		const next = firstFrom(after, at);
		const near =
			next > 0 && at - after[next - 1] < (after[next] ?? Infinity) - at ? next - 1 : next;
		return Math.abs((after[near] ?? Infinity) - at) <= NEAR_S ? x[near] : NaN;
	});
}
