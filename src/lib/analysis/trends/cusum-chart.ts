/** A chart of cumulative sums, one for each direction. */
export interface CusumChart {
	readonly high: Float64Array;
	readonly low: Float64Array;
	/** Positions where either sum lies above the limit. */
	readonly signals: readonly number[];
}

/**
 * Tabular CUSUM (Page 1954): high = max(0, high + y − target − k), low = max(0, low + target − k − y),
 * an alarm above h. The sums run on after an alarm. A NaN value leaves both sums where they are and
 * gives no alarm.
 * @param k half the shift to catch, in units of y, ≥ 0
 * @param h limit, > 0
 * @throws RangeError k or h out of range
 * Source: NIST/SEMATECH e-Handbook 6.3.2.3. Cost: O(n).
 */
export function cusumChart(
	y: ArrayLike<number>,
	{ target, k, h }: { readonly target: number; readonly k: number; readonly h: number }
): CusumChart {
	if (!(k >= 0 && h > 0)) throw new RangeError(`k must be ≥ 0 and h above 0: ${k}, ${h}`);
	const high = new Float64Array(y.length);
	const low = new Float64Array(y.length);
	const signals: number[] = [];
	let above = 0;
	let below = 0;
	for (let i = 0; i < y.length; i++) {
		const isSeen = Number.isFinite(y[i]);
		if (isSeen) {
			above = Math.max(0, above + y[i] - target - k);
			below = Math.max(0, below + target - k - y[i]);
		}
		high[i] = above;
		low[i] = below;
		if (isSeen && (above > h || below > h)) signals.push(i);
	}
	return { high, low, signals };
}
