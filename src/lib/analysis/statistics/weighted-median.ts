/**
 * Median of a list in which value i stands `weightOf(i)` times, without writing the list out.
 * The mean of the two middle values when the total is even, as for a plain median.
 * @param sorted   ascending
 * @param group    group of each sorted value
 * @param copies   how many times each group stands in the list (whole numbers)
 * @returns NaN when the total is zero
 * Cost: O(n).
 */
export function weightedMedian(
	sorted: Float64Array,
	group: Int32Array,
	copies: Int32Array
): number {
	let total = 0;
	for (let i = 0; i < group.length; i++) total += copies[group[i]];
	if (total === 0) return NaN;
	const lowRank = Math.floor((total - 1) / 2);
	const highRank = Math.floor(total / 2);
	let seen = 0;
	let low = NaN;
	for (let i = 0; i < sorted.length; i++) {
		const before = seen;
		seen += copies[group[i]];
		if (before <= lowRank && lowRank < seen) low = sorted[i];
		if (before <= highRank && highRank < seen) return (low + sorted[i]) / 2;
	}
	return NaN;
}
