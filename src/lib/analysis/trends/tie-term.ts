/** Sizes of the groups of equal values, in ascending order of the value; NaN counts as one value. */
export function tieSizes(values: ArrayLike<number>): number[] {
	const sizes = new Map<number, number>();
	for (const value of Float64Array.from(values).sort()) {
		sizes.set(value, (sizes.get(value) ?? 0) + 1);
	}
	return [...sizes.values()];
}

/** Σ t(t − 1)(2t + 5) over groups of t equal values, by which ties narrow Kendall's S. */
export function tieTerm(values: ArrayLike<number>): number {
	return tieSizes(values).reduce((sum, t) => sum + t * (t - 1) * (2 * t + 5), 0);
}
