/**
 * What false matches do to a mean map correlation. Of all matched pairs a share π is one cell, and those
 * have mean correlation r_true; the rest are two cells, and those have the mean of the null, r_null.
 * The mean over all of them is therefore r = π r_true + (1 − π) r_null, exactly for plain means (or
 * for means of Fisher z, taken throughout), whatever the spread of either kind.
 * @param precision π, for example the mean match probability of the pairs
 * @throws RangeError precision outside [0, 1]
 */
export function meanWithFalseMatches(
	precision: number,
	trueMean: number,
	nullMean: number
): number {
	demandShare(precision);
	return precision * trueMean + (1 - precision) * nullMean;
}

/**
 * The mean of the true matches that an observed mean stands for, (r − (1 − π) r_null)/π. The error of the
 * observed mean grows by 1/π. It may leave [−1, 1] when π is wrong, and is not cut then.
 * @returns NaN when precision is 0
 * @throws RangeError precision outside [0, 1]
 */
export function meanOfTrueMatches(
	precision: number,
	observedMean: number,
	nullMean: number
): number {
	demandShare(precision);
	return precision > 0 ? (observedMean - (1 - precision) * nullMean) / precision : NaN;
}

function demandShare(precision: number): void {
	if (!(precision >= 0 && precision <= 1)) {
		throw new RangeError(`precision ${precision} is outside 0 to 1`);
	}
}
