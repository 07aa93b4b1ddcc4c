/**
 * Quantile by linear interpolation between order statistics (type 7 of Hyndman and Fan 1996).
 * @param sorted ascending, no NaN
 * @param q      in [0, 1]
 * @returns NaN when `sorted` is empty
 * @throws RangeError q outside [0, 1]
 */
export function quantileSorted(sorted: ArrayLike<number>, q: number): number {
	if (!(q >= 0 && q <= 1)) throw new RangeError(`quantile ${q} is outside 0 to 1`);
	if (sorted.length === 0) return NaN;
	const at = q * (sorted.length - 1);
	const low = Math.floor(at);
	const high = Math.min(low + 1, sorted.length - 1);
	return sorted[low] + (at - low) * (sorted[high] - sorted[low]);
}

/** Quantile (type 7) of values in any order; the input stays as it is, NaN values are left out. */
export function quantile(values: ArrayLike<number>, q: number): number {
	// By hand: `Float64Array.from(…).filter(…)` boxes every number on its way.
	const finite = new Float64Array(values.length);
	let count = 0;
	for (let i = 0; i < values.length; i++) {
		if (Number.isFinite(values[i])) finite[count++] = values[i];
	}
	return quantileSorted(finite.subarray(0, count).sort(), q);
}

/** Median of the finite values; NaN when there are none. */
export function median(values: ArrayLike<number>): number {
	return quantile(values, 0.5);
}
