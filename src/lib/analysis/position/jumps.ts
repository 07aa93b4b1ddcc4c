import type { Metric } from '../arena/metric';

/** Faster than this the track must have jumped, cm/s (common practice). */
export const FASTEST_CM_S = { rat: 150, mouse: 100 } as const;

/**
 * Marks samples that the animal cannot have reached: the step to them from the last kept sample is
 * faster than `fastestCmS`. A jump away and the jump back are one excursion, whose samples are
 * marked and not the one after it; a jump without a return within `longestS` marks only the sample
 * it lands on, as either place may be the true one. Nothing is removed.
 * @param xCm      NaN where unknown; such samples are not marked
 * @param stretch  stretch of each sample, −1 for none; a step never spans two
 * @param longestS an excursion that lasts longer is not one, s
 * @returns 1 for rejected samples, 0 for others
 * @throws RangeError fastestCmS or longestS not above 0
 * Cost: O(n + jumps · samples in longestS).
 */
export function rejectJumps(
	tS: Float64Array,
	xCm: Float64Array,
	yCm: Float64Array,
	stretch: Int32Array,
	metric: Metric,
	fastestCmS: number,
	longestS = 0.5
): Uint8Array {
	if (!(fastestCmS > 0)) throw new RangeError(`the fastest must be above 0, got ${fastestCmS}`);
	if (!(longestS > 0)) throw new RangeError(`the longest must be above 0, got ${longestS}`);
	const isRejected = new Uint8Array(tS.length);
	const isJump = (from: number, to: number) =>
		metric(xCm[from], yCm[from], xCm[to], yCm[to]) > fastestCmS * (tS[to] - tS[from]);
	const known = knownSamples(tS.length, stretch, xCm, yCm, metric);
	let kept = -1;
	let k = 0;
	while (k < known.length) {
		const i = known[k];
		if (kept < 0 || stretch[kept] !== stretch[i] || !isJump(kept, i)) {
			kept = i;
			k++;
			continue;
		}
		const back = returnAfter(known, k, kept, tS, stretch, isJump, longestS);
		const end = back > 0 ? back : k + 1;
		for (let j = k; j < end; j++) isRejected[known[j]] = 1;
		// Without a return the path goes on from where it landed, marked or not.
		if (back < 0) kept = i;
		k = end;
	}
	return isRejected;
}

function knownSamples(
	count: number,
	stretch: Int32Array,
	xCm: Float64Array,
	yCm: Float64Array,
	metric: Metric
): Int32Array {
	const out = new Int32Array(count);
	let known = 0;
	for (let i = 0; i < count; i++) {
		if (stretch[i] < 0 || Number.isNaN(metric(xCm[i], yCm[i], xCm[i], yCm[i]))) continue;
		out[known++] = i;
	}
	return out.subarray(0, known);
}

/** Where in `known` the path is back within reach of `kept` after its jump at `k`; −1 if never. */
function returnAfter(
	known: Int32Array,
	k: number,
	kept: number,
	tS: Float64Array,
	stretch: Int32Array,
	isJump: (from: number, to: number) => boolean,
	longestS: number
): number {
	for (let j = k + 1; j < known.length; j++) {
		const i = known[j];
		if (stretch[i] !== stretch[kept] || tS[i] - tS[known[k]] > longestS) return -1;
		if (isJump(known[j - 1], i) && !isJump(kept, i)) return j;
	}
	return -1;
}
